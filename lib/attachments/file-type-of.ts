/** What a file is, told from its bytes and never from its name or from what the browser says. */
import { fileTypeFromBuffer } from 'file-type';
import { csvRows } from '@/lib/entries/csv';
import type { AttachmentType } from './attachment';

/** Rows of a CSV file that are looked at. */
const ROWS_SEEN = 200;
const SVG_ROOT = /^\uFEFF?\s*(?:<\?xml[^>]*\?>\s*)?(?:<!--[\s\S]*?-->\s*|<!DOCTYPE\s+svg[^>[]*>\s*)*<svg[\s>]/i;

function utf8(bytes: Uint8Array): string | null {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return null;
  }
}

/** Rows of equal length, at least two columns, no control characters: what any plotting program would read. */
function isCsv(text: string): boolean {
  if (/[\u0000-\u0008\u000B\u000C\u000E-\u001F\u007F]/.test(text)) return false;
  const rows = csvRows(text.split('\n', ROWS_SEEN).join('\n'));
  const columns = rows[0]?.fields.length ?? 0;
  return columns >= 2 && rows.every(({ fields }) => fields.length === columns);
}

/** @returns null for everything that is not accepted: archives, programs, pages, text without columns */
export async function fileTypeOf(bytes: Uint8Array): Promise<AttachmentType | null> {
  const found = await fileTypeFromBuffer(bytes);
  if (found?.mime === 'application/pdf' || found?.mime === 'image/png') return found.mime;
  // Some drawing programs' SVG is reported as XML.
  if (found && found.mime !== 'application/xml') return null;
  const text = utf8(bytes);
  if (text === null) return null;
  if (SVG_ROOT.test(text)) return 'image/svg+xml';
  return !found && isCsv(text) ? 'text/csv' : null;
}
