import { Letters } from '@/components/math/letters';
import { decimalText, symbolText, withSymbols } from '@/lib/facts/reading-texts';
import type { StabilityMapModel } from '@/lib/facts/stability-map-model';

const LEFT = 56;
const RIGHT = 500;
const TOP = 26;
const BOTTOM = 330;
/** Columns and rows of the table of numbers. */
const TABLE_COLUMNS = 9;
const TABLE_ROWS = 7;

interface Run {
  readonly from: number;
  readonly to: number;
  readonly row: number;
  readonly stable: boolean;
}

/** Neighbouring cells of a row that share their answer, as one rectangle each. */
function runsOf({ xs, ys, stable }: StabilityMapModel): Run[] {
  return ys.flatMap((_, row) => {
    const runs: Run[] = [];
    xs.forEach((_x, k) => {
      const isStable = stable[row * xs.length + k] ?? false;
      const last = runs.at(-1);
      if (last && last.stable === isStable) runs[runs.length - 1] = { ...last, to: k + 1 };
      else runs.push({ from: k, to: k + 1, row, stable: isStable });
    });
    return runs;
  });
}

const spread = (count: number, among: number) =>
  Array.from({ length: count }, (_, k) => Math.round((k * (among - 1)) / (count - 1)));

const name = ({ upward, tied }: StabilityMapModel) => [upward, ...tied].map(symbolText).join(' = ');

/** Where two numbers together keep every wave from growing: ink where stable, hatched where not. */
function Drawing({ map, label }: { map: StabilityMapModel; label: string }) {
  const { xs, ys } = map;
  const width = (RIGHT - LEFT) / xs.length;
  const height = (BOTTOM - TOP) / ys.length;
  const x = (column: number) => LEFT + (column + 0.5) * width;
  const y = (row: number) => BOTTOM - (row + 0.5) * height;
  return (
    <svg className="plot stabmap" viewBox="0 0 520 384" role="img" aria-label={label}>
      {runsOf(map).map(({ from, to, row, stable }) => (
        <rect
          key={`${row}:${from}`}
          x={LEFT + from * width}
          y={BOTTOM - (row + 1) * height}
          width={(to - from) * width}
          height={height}
          className={stable ? 'map-on' : 'map-off'}
        />
      ))}
      <rect x={LEFT} y={TOP} width={RIGHT - LEFT} height={BOTTOM - TOP} className="p-ax" />
      {spread(5, xs.length).map((column) => (
        <text key={column} x={x(column)} y={BOTTOM + 18} className="p-t" textAnchor="middle">
          {decimalText(xs[column]!, 2)}
        </text>
      ))}
      {spread(5, ys.length).map((row) => (
        <text key={row} x={LEFT - 8} y={y(row) + 4} className="p-t" textAnchor="end">
          {decimalText(ys[row]!, 2)}
        </text>
      ))}
      <text x={RIGHT} y={BOTTOM + 42} className="p-l m" textAnchor="end">
        {symbolText(map.across)}
      </text>
      <text x={LEFT - 44} y={TOP - 10} className="p-l m">
        {name(map)}
      </text>
    </svg>
  );
}

function Numbers({ map }: { map: StabilityMapModel }) {
  const columns = spread(TABLE_COLUMNS, map.xs.length);
  const rows = spread(TABLE_ROWS, map.ys.length).toReversed();
  return (
    <details className="numbers">
      <summary>The region as numbers</summary>
      <div className="xs" tabIndex={0} role="group" aria-label="Stable and unstable values, table">
        <table>
          <thead>
            <tr>
              <th scope="col">
                <Letters text={`${name(map)} \\ ${symbolText(map.across)}`} />
              </th>
              {columns.map((column) => (
                <th key={column} scope="col" className="r">
                  {decimalText(map.xs[column]!, 3)}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map((row) => (
              <tr key={row}>
                <th scope="row" className="r">
                  {decimalText(map.ys[row]!, 3)}
                </th>
                {columns.map((column) => (
                  <td key={column} className="r">
                    {map.stable[row * map.xs.length + column] ? 'stable' : 'grows'}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </details>
  );
}

/**
 * @param condition the region in words, null where none is known in closed form
 */
export function StabilityMap({ map, condition }: { map: StabilityMapModel; condition: string | null }) {
  const words = condition && withSymbols(condition);
  const label = `Stable values of ${symbolText(map.across)} and ${name(map)}${words ? `: ${words}` : ''}`;
  return (
    <figure className="lonefigure">
      <Drawing map={map} label={label} />
      <figcaption className="cap">
        Ink: no wave grows. Hatching: some wave does. <Letters text={words ? `In closed form: ${words}.` : ''} /> Drawn
        from a grid of waves in double precision; bounds and condition stand above with how they were found.
      </figcaption>
      <Numbers map={map} />
    </figure>
  );
}
