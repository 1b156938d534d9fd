import { SaveRows } from './save-plot';

/** A curve on logarithmic axes; its points ascend in neither axis necessarily. */
export interface LogCurve {
  readonly name: string;
  readonly look: 'c1' | 'c2' | 'c3' | 'c4' | 'c5';
  readonly points: readonly (readonly [x: number, y: number])[];
}

export interface LogPlotData {
  readonly title: string;
  readonly unitX: string;
  /** Sentence for those who cannot see the plot. */
  readonly label: string;
  readonly x: readonly [number, number];
  readonly y: readonly [number, number];
  readonly ticksX: readonly { readonly at: number; readonly text: string }[];
  readonly ticksY: readonly { readonly at: number; readonly text: string }[];
  readonly reference?: { readonly at: number; readonly text: string };
  readonly curves: readonly LogCurve[];
  /** Points told in words; the one asked for is drawn as the bubble. */
  readonly marks?: readonly {
    readonly x: number;
    readonly y: number;
    readonly text: string;
    readonly asked?: boolean;
  }[];
}

const SIZES = {
  wide: { width: 470, height: 230, left: 54, right: 422, top: 28, bottom: 180 },
  tall: { width: 640, height: 372, left: 54, right: 614, top: 34, bottom: 328 },
} as const;
type Size = (typeof SIZES)[keyof typeof SIZES];

const place = (value: number, [low, high]: readonly [number, number], from: number, to: number) =>
  from + (Math.log(value / low) / Math.log(high / low)) * (to - from);

interface NamePlace {
  readonly x: number;
  readonly y: number;
  readonly anchor: 'start' | 'end';
}

/** Names stand where their curve is farthest from the others, never over another name or outside the axes. */
function namePlaces(data: LogPlotData, size: Size, marks: readonly NamePlace[]): (NamePlace | null)[] {
  const taken: NamePlace[] = [...marks];
  const drawn = data.curves.map((curve) =>
    curve.points.map(
      ([x, y]) => [place(x, data.x, size.left, size.right), place(y, data.y, size.bottom, size.top)] as const,
    ),
  );
  return data.curves.map((curve, own) => {
    const reach = curve.name.length * 7;
    let best: NamePlace | null = null;
    let most = -Infinity;
    for (const [x, y] of drawn[own]!)
      for (const anchor of ['start', 'end'] as const) {
        const at = { x: x + (anchor === 'start' ? 10 : -10), y: y + 4, anchor };
        const [from, to] = anchor === 'start' ? [at.x, at.x + reach] : [at.x - reach, at.x];
        if (from < size.left + 4 || to > size.right - 2 || y < size.top + 12 || y > size.bottom - 10) continue;
        const middle = (from + to) / 2;
        const gaps = drawn.flatMap((points) =>
          points.map(([px, py]) => Math.max(Math.abs(px - middle) - reach / 2, Math.abs(py - y) - 5)),
        );
        const names = taken.map((name) => Math.max(Math.abs(name.x - at.x) - reach, Math.abs(name.y - at.y) - 12));
        const room = Math.min(24, ...gaps, ...names);
        if (room > most) [most, best] = [room, at];
      }
    if (best) taken.push(best);
    return best;
  });
}

/** A plot whose axes are both logarithmic, with its numbers as a table and as files. */
export function LogPlot({ data, id, look = 'wide' }: { data: LogPlotData; id: string; look?: keyof typeof SIZES }) {
  const size = SIZES[look];
  const { left, right, top, bottom, width, height } = size;
  const xOf = (value: number) => place(value, data.x, left, right);
  const yOf = (value: number) => place(value, data.y, bottom, top);
  const inside = (value: number, [low, high]: readonly [number, number]) => value >= low && value <= high;
  const marks = (data.marks ?? []).filter(({ x, y }) => inside(x, data.x) && inside(y, data.y));
  const names = namePlaces(
    data,
    size,
    marks.map(({ x, y }) => ({ x: xOf(x) + 20, y: yOf(y), anchor: 'start' })),
  );
  return (
    <>
      <svg
        className="plot"
        viewBox={`0 0 ${width} ${height}`}
        style={{ maxWidth: width * 1.1 }}
        role="img"
        aria-label={data.label}
      >
        {data.ticksY.map(({ at, text }) => (
          <g key={at}>
            <path d={`M${left} ${yOf(at)}H${right}`} className="p-grid" />
            <text x={left - 8} y={yOf(at) + 4} className="p-t" textAnchor="end">
              {text}
            </text>
          </g>
        ))}
        {data.ticksX.map(({ at, text }) => (
          <g key={at}>
            <path d={`M${xOf(at)} ${bottom}v6`} className="p-ax" />
            <text x={xOf(at)} y={bottom + 20} className="p-t" textAnchor="middle">
              {text}
            </text>
          </g>
        ))}
        <path d={`M${left} ${top}V${bottom}H${right}`} className="p-ax" />
        {data.reference && (
          <>
            <path d={`M${left} ${yOf(data.reference.at)}H${right}`} className="p-ref" />
            <text
              x={look === 'wide' ? right + 6 : right - 3}
              y={yOf(data.reference.at) + (look === 'wide' ? 4 : -7)}
              className="p-t"
              textAnchor={look === 'wide' ? 'start' : 'end'}
            >
              {data.reference.text}
            </text>
          </>
        )}
        <clipPath id={id}>
          <rect x={left} y={top - 1} width={right - left} height={bottom - top + 2} />
        </clipPath>
        <g clipPath={`url(#${id})`}>
          {data.curves.map((curve) => (
            <polyline
              key={curve.name}
              points={curve.points.map(([x, y]) => `${xOf(x).toFixed(1)},${yOf(y).toFixed(1)}`).join(' ')}
              className={`p-line ${curve.look}`}
            />
          ))}
        </g>
        {data.curves.map((curve, k) => {
          const name = names[k];
          return (
            name && (
              <text key={curve.name} x={name.x} y={name.y} className="p-l" textAnchor={name.anchor}>
                {curve.name}
              </text>
            )
          );
        })}
        {marks.map(({ x, y, text, asked }) => (
          <g key={text}>
            {asked ? (
              <>
                <rect x={xOf(x) - 8} y={yOf(y) - 5.7} width="16.2" height="11.4" rx="5.7" className="s-new" />
                <path
                  d={`M${xOf(x) - 12.6} ${yOf(y) - 9.3}v18.6M${xOf(x) + 12.6} ${yOf(y) - 9.3}v18.6`}
                  className="s-tick"
                />
              </>
            ) : (
              <path d={`M${xOf(x)} ${yOf(y) - 8}v16`} className="s-tick" />
            )}
            <text
              x={xOf(x) + (xOf(x) > right - 90 ? -18 : 18)}
              y={yOf(y) - 8}
              className="p-l"
              textAnchor={xOf(x) > right - 90 ? 'end' : 'start'}
            >
              {text}
            </text>
          </g>
        ))}
        <text x="0" y="11" className="p-y">
          {data.title}
        </text>
        <text x={right} y={height - 3} className="p-x" textAnchor="end">
          {data.unitX}
        </text>
      </svg>
      <NumbersTable data={data} />
      <SaveRows rows={rowsOf(data)} name={id} />
    </>
  );
}

const rowsOf = ({ curves, unitX, title }: LogPlotData) => [
  ['curve', unitX, title],
  ...curves.flatMap(({ name, points }) => points.map(([x, y]) => [name, x, y] as const)),
];

const TABLE_EVERY = 6;

function NumbersTable({ data }: { data: LogPlotData }) {
  return (
    <details className="numbers">
      <summary>{data.title}: the numbers</summary>
      <div className="xs" tabIndex={0} role="group" aria-label={`${data.title}, table`}>
        <table>
          <thead>
            <tr>
              <th scope="col">Curve</th>
              <th scope="col" className="r">
                {data.unitX}
              </th>
              <th scope="col" className="r">
                {data.title}
              </th>
            </tr>
          </thead>
          <tbody>
            {data.curves.flatMap(({ name, points }) =>
              points
                .filter((_, k) => k % TABLE_EVERY === 0)
                .map(([x, y]) => (
                  <tr key={`${name}:${x}`}>
                    <td>{name}</td>
                    <td className="r">{Number(x.toPrecision(4))}</td>
                    <td className="r">{Number.isFinite(y) ? Number(y.toPrecision(3)) : '–'}</td>
                  </tr>
                )),
            )}
          </tbody>
        </table>
      </div>
    </details>
  );
}
