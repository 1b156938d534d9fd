'use client';

import type { ThetaPlotData } from './theta-plot';

function save(name: string, type: string, text: string) {
  const address = URL.createObjectURL(new Blob([text], { type }));
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  link.click();
  URL.revokeObjectURL(address);
}

const csv = ({ theta, curves }: ThetaPlotData) =>
  [
    ['theta', ...curves.map((curve) => curve.name)],
    ...theta.map((angle, k) => [angle, ...curves.map((curve) => curve.values[k] ?? '')]),
  ]
    .map((row) =>
      row
        .map((cell) =>
          typeof cell === 'string' && /[",\n]/.test(cell) ? `"${cell.replace(/"/g, '""')}"` : String(cell),
        )
        .join(','),
    )
    .join('\r\n') + '\r\n';

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
function standalone(drawing: SVGSVGElement): string {
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

/** Saves the plot that stands before these words, as a drawing or as numbers. */
export function SavePlot({ data, name }: { data: ThetaPlotData; name: string }) {
  return (
    <p className="save small">
      <button
        type="button"
        className="word"
        onClick={(event) => {
          const drawings = event.currentTarget.closest('figure')?.querySelectorAll<SVGSVGElement>('svg.plot') ?? [];
          const shown = [...drawings].find((drawing) => drawing.getBoundingClientRect().width > 0);
          if (shown) save(`${name}.svg`, 'image/svg+xml', standalone(shown));
        }}
      >
        Save as SVG
      </button>
      <button type="button" className="word" onClick={() => save(`${name}.csv`, 'text/csv', csv(data))}>
        Save numbers as CSV
      </button>
    </p>
  );
}
