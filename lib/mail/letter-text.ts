/** Values and templates → a letter as plain text and as HTML. */
import { type View, fillTemplate } from '@/lib/codegen/kernel-source';
import { wrapProse } from '@/lib/codegen/wrap-text';

const ENTITY: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};
export const escapeHtml = (text: string) => text.replace(/[&<>"']/g, (character) => ENTITY[character]!);

/** Every value escaped; line breaks that somebody wrote are kept. */
export function escapeView(view: View): View {
  return Object.fromEntries(
    Object.entries(view).map(([name, value]) => [
      name,
      typeof value === 'string' ? escapeHtml(value).replaceAll('\n', '<br>') : value.map(escapeView),
    ]),
  );
}

/** RFC 5322, section 2.1.1, asks for at most 78 characters a line; addresses are left whole. */
const WIDTH = 76;

const wrap = (text: string) =>
  text
    .split('\n')
    .flatMap((line) => (line.length > WIDTH ? wrapProse(line, WIDTH, /^\s*/.exec(line)![0]) : [line]))
    .join('\n');

/** Control characters of what people typed have no business in a letter, least of all in its head. */
export const oneLine = (text: string) => text.replace(/[\p{Cc}\u2028\u2029]+/gu, ' ').trim();

/** Two forms of one text. */
export interface Forms {
  text: string;
  html: string;
}

export interface Frame {
  /** Who reads it. */
  name: string;
  office: string;
  /** Why it came, and where that can be changed. */
  reason: string;
  profileUrl: string;
}

/**
 * The templates of one shape, filled.
 * @throws {RangeError} naming file and line, where a template has a hole without a value or the reverse
 */
export const filled = (shape: string, templates: Forms, view: View): Forms => ({
  text: fillTemplate(`${shape}.txt`, templates.text, view).trimEnd(),
  html: fillTemplate(`${shape}.html`, templates.html, escapeView(view)).trimEnd(),
});

/** A body within what every letter has around it. */
export const framed = (templates: Forms, frame: Frame, body: Forms): Forms => ({
  text: wrap(fillTemplate('frame.txt', templates.text, { ...frame, body: body.text })),
  html: fillTemplate('frame.html', templates.html, { ...escapeView({ ...frame }), body: body.html }),
});

/** Bodies one after another. */
export const joined = (templates: Forms, bodies: readonly Forms[]): Forms => ({
  text: fillTemplate('daily.txt', templates.text, { items: bodies.map(({ text }) => ({ body: text })) }).trimEnd(),
  html: fillTemplate('daily.html', templates.html, { items: bodies.map(({ html }) => ({ body: html })) }).trimEnd(),
});
