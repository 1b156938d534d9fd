/** Lines of generated files within their width. */

/** A space that no line break may take: inside brackets of an index. */
export const HARD_SPACE = '\u00a0';
const soften = (text: string) => text.replaceAll(HARD_SPACE, ' ');

/** Breaks prose at spaces. @returns lines of at most `width` characters where words allow */
export function wrapProse(text: string, width: number, hanging = ''): string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(' ')) {
    if (line !== '' && line.length + 1 + word.length > width) {
      lines.push(line);
      line = hanging + word;
    } else line = line === '' ? word : `${line} ${word}`;
  }
  lines.push(line);
  return lines;
}

/**
 * Breaks a statement before a " + ", " - " or after a ", ".
 * @param more what ends a line that goes on (" &" in Fortran, "" in C)
 */
export function wrapStatement(text: string, width: number, more = ''): string {
  const lines: string[] = [];
  let rest = text;
  while (rest.length > width) {
    const part = rest.slice(0, width);
    const at = Math.max(
      ...[' + ', ' - ', ' = ', ' && ', ' || ', ' .and. ', ' .or. ', ' and ', ' or '].map((b) => part.lastIndexOf(b)),
      part.lastIndexOf(', ') + 1,
    );
    if (at <= 4) break;
    lines.push(`${rest.slice(0, at)}${more}`);
    rest = `    ${rest.slice(at).trimStart()}`;
  }
  return soften([...lines, rest].join('\n'));
}
