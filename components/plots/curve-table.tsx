import type { ThetaPlotData } from './theta-plot';

const STEPS = 16;
const PARTS = [
  '0',
  'π/16',
  'π/8',
  '3π/16',
  'π/4',
  '5π/16',
  '3π/8',
  '7π/16',
  'π/2',
  '9π/16',
  '5π/8',
  '11π/16',
  '3π/4',
  '13π/16',
  '7π/8',
  '15π/16',
  'π',
];

/** Four decimals; a last bit that differs between machines must not turn 0 into −0. */
const fixedText = (value: number) =>
  value
    .toFixed(4)
    .replace(/^-(?=0\.0000$)/, '')
    .replace('-', '−');

/** The numbers of a plot as a table, at every sixteenth of π. */
export function CurveTable({ data }: { data: ThetaPlotData }) {
  const indexOf = (step: number) => Math.round((step / STEPS) * (data.theta.length - 1));
  return (
    <details className="numbers">
      <summary>{data.title}: the numbers</summary>
      <div className="xs" tabIndex={0} role="group" aria-label={`${data.title}, table`}>
        <table>
          <thead>
            <tr>
              <th scope="col">θ</th>
              {data.curves.map((curve) => (
                <th key={curve.name} scope="col" className="r">
                  {curve.name}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {PARTS.map((part, step) => (
              <tr key={part}>
                <th scope="row" className="m">
                  {part}
                </th>
                {data.curves.map((curve) => {
                  const value = curve.values[indexOf(step)] ?? null;
                  return (
                    <td key={curve.name} className="r">
                      {value === null ? '–' : fixedText(value)}
                    </td>
                  );
                })}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </details>
  );
}
