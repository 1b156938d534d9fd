'use client';

import { csvOfRows, saveDrawing, saveFile } from './save-file';
import type { ThetaPlotData } from './theta-plot';

const rowsOf = ({ theta, curves }: ThetaPlotData) => [
  ['theta', ...curves.map((curve) => curve.name)],
  ...theta.map((angle, k) => [angle, ...curves.map((curve) => curve.values[k] ?? '')]),
];

/** Saves the plot that stands before these words, as a drawing or as numbers. */
export const SavePlot = ({ data, name }: { data: ThetaPlotData; name: string }) => (
  <SaveRows rows={rowsOf(data)} name={name} />
);

/** The same for any plot whose numbers are rows, the first of them the heads of the columns. */
export function SaveRows({ rows, name }: { rows: readonly (readonly (string | number)[])[]; name: string }) {
  return (
    <p className="save small">
      <button type="button" className="word" onClick={(event) => saveDrawing(event.currentTarget, name)}>
        Save as SVG
      </button>
      <button type="button" className="word" onClick={() => saveFile(`${name}.csv`, 'text/csv', csvOfRows(rows))}>
        Save numbers as CSV
      </button>
    </p>
  );
}
