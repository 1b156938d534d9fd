import { gzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { safeFileName, sizeText } from '@/lib/attachments/attachment';
import { fileTypeOf } from '@/lib/attachments/file-type-of';

const text = (content: string) => new TextEncoder().encode(content);
const PNG = Uint8Array.from([
  137, 80, 78, 71, 13, 10, 26, 10, 0, 0, 0, 13, 73, 72, 68, 82, 0, 0, 0, 1, 0, 0, 0, 1, 8, 6, 0, 0, 0, 31, 21, 196, 137,
]);

describe('the type of a file', () => {
  it.each([
    ['a PDF', text('%PDF-1.7\n1 0 obj\n'), 'application/pdf'],
    ['a PNG', PNG, 'image/png'],
    ['an SVG', text('<svg xmlns="http://www.w3.org/2000/svg"><path d="M0 0"/></svg>'), 'image/svg+xml'],
    ['an SVG behind its prologue', text('<?xml version="1.0"?>\n<!-- drawn -->\n<svg></svg>'), 'image/svg+xml'],
    ['a CSV', text('theta,modulus\n0,1\n0.1,0.999\n'), 'text/csv'],
  ])('is told from its bytes: %s', async (_, bytes, type) => expect(await fileTypeOf(bytes)).toBe(type));

  it.each([
    ['a page', text('<!doctype html><svg></svg>')],
    ['a page that hides in XML', text('<?xml version="1.0"?><html xmlns="http://www.w3.org/1999/xhtml"/>')],
    ['plain text', text('only words here')],
    ['rows of unequal length', text('a,b\n1,2,3\n')],
    ['an archive', Uint8Array.from([80, 75, 3, 4, 20, 0, 0, 0, 8, 0, 0, 0, 0, 0])],
    ['a bomb of compressed nothing', gzipSync(Buffer.alloc(4_000_000))],
    ['a program', Uint8Array.from([127, 69, 76, 70, 2, 1, 1, 0, 0, 0, 0, 0, 0, 0, 0, 0])],
    ['bytes that are no text', Uint8Array.from([255, 254, 253, 44, 10])],
    ['control characters', text('a,b\n\u0007,2\n')],
    ['an SVG whose doctype brings entities along', text('<!DOCTYPE svg [<!ENTITY a "aaaa">]><svg>&a;</svg>')],
    ['nothing', new Uint8Array()],
  ])('is none of the accepted ones: %s', async (_, bytes) => expect(await fileTypeOf(bytes)).toBeNull());
});

describe('the name of a file', () => {
  it.each([
    ['../../etc/passwd', 'passwd'],
    ['C:\\plots\\a.png', 'a.png'],
    ['a"\r\nX: y.csv', 'aX y.csv'],
    ['', 'file'],
    ['...', 'file'],
    [`${'x'.repeat(200)}.pdf`, `${'x'.repeat(116)}.pdf`],
  ])('%j becomes %j', (name, safe) => expect(safeFileName(name)).toBe(safe));
});

it.each([
  [12, '12 B'],
  [12_400, '12.4 kB'],
  [10_485_760, '10.5 MB'],
])('%i bytes read %s', (bytes, words) => expect(sizeText(bytes)).toBe(words));
