/** Files made in the browser from what a page shows. */

export function saveFile(name: string, type: string, text: string) {
  const address = URL.createObjectURL(new Blob([text], { type }));
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  link.click();
  URL.revokeObjectURL(address);
}

/** A cell of CSV (RFC 4180). */
const cellText = (cell: string | number) =>
  typeof cell === 'string' && /[",\n]/.test(cell) ? `"${cell.replace(/"/g, '""')}"` : String(cell);

export const csvOfRows = (rows: readonly (readonly (string | number)[])[]) =>
  `${rows.map((row) => row.map(cellText).join(',')).join('\r\n')}\r\n`;

const DRAWN = [
  'fill',
  'stroke',
  'stroke-width',
  'stroke-dasharray',
  'stroke-linejoin',
  'font-family',
  'font-size',
  'font-style',
  'font-weight',
  'paint-order',
  'opacity',
] as const;

/** The drawing with its looks written into it, so that it stands alone outside the page. */
export function standaloneDrawing(drawing: SVGSVGElement): string {
  const copy = drawing.cloneNode(true) as SVGSVGElement;
  copy.setAttribute('xmlns', 'http://www.w3.org/2000/svg');
  const originals = drawing.querySelectorAll<SVGElement>('*');
  copy.querySelectorAll<SVGElement>('*').forEach((part, k) => {
    const look = getComputedStyle(originals[k]!);
    part.setAttribute('style', DRAWN.map((property) => `${property}:${look.getPropertyValue(property)}`).join(';'));
    part.removeAttribute('class');
  });
  const hatch = document.getElementById('hatch')?.cloneNode(true);
  if (hatch instanceof SVGElement) {
    const original = document.querySelector('#hatch path');
    if (original)
      hatch
        .querySelector('path')
        ?.setAttribute(
          'style',
          `stroke:${getComputedStyle(original).stroke};stroke-width:${getComputedStyle(original).strokeWidth}`,
        );
    const defs = document.createElementNS('http://www.w3.org/2000/svg', 'defs');
    defs.append(hatch);
    copy.prepend(defs);
  }
  return new XMLSerializer().serializeToString(copy);
}

/** Saves the drawing of the figure around `button` that is shown on this screen. */
export function saveDrawing(button: HTMLElement, name: string) {
  const drawings = button.closest('figure')?.querySelectorAll<SVGSVGElement>('svg.plot') ?? [];
  const shown = [...drawings].find((drawing) => drawing.getBoundingClientRect().width > 0);
  if (shown) saveFile(`${name}.svg`, 'image/svg+xml', standaloneDrawing(shown));
}
