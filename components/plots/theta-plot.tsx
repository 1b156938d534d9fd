import { NARROW_PLOT, ThetaFrame, WIDE_PLOT, polyline, thetaX, valueY, type PlotSize } from './plot-frame';

/** One curve against the phase angle; at most five plain ones in a plot, in the order of the dashes. */
export interface Curve {
  readonly name: string;
  /** c1 … c5 by the order of the dashes, cr past the bound, cg from another entry or a computational mode. */
  readonly look: 'c1' | 'c2' | 'c3' | 'c4' | 'c5' | 'cr' | 'cg';
  readonly values: readonly (number | null)[];
}

export interface ThetaPlotData {
  readonly title: string;
  /** Sentence for those who cannot see the plot. */
  readonly label: string;
  readonly theta: readonly number[];
  readonly curves: readonly Curve[];
  readonly range: readonly [number, number];
  readonly growthAbove?: number;
  readonly reference?: number;
}

function ticksOf([low, high]: readonly [number, number]) {
  const span = high - low;
  const step = [0.1, 0.25, 0.5, 1, 2, 2.5, 5, 10].find((size) => span / size <= 4.01) ?? span / 4;
  const first = Math.ceil(low / step - 1e-9) * step;
  return Array.from({ length: Math.floor((high - first) / step + 1e-9) + 1 }, (_, k) => {
    const at = first + k * step;
    return { at, text: String(Number(at.toFixed(2))).replace('-', '−') };
  });
}

interface Place {
  readonly x: number;
  readonly y: number;
  readonly anchor: 'start' | 'end';
}

/** Where the name of each curve stands: where it keeps farthest from the other curves, names never over one another. */
function namePlaces(size: PlotSize, data: ThetaPlotData): (Place | null)[] {
  const taken: Place[] = [];
  const inside = (value: number | null | undefined): value is number =>
    value !== null && value !== undefined && value >= data.range[0] && value <= data.range[1];
  return data.curves.map((curve, index) => {
    let best: Place | null = null;
    let bestRoom = -Infinity;
    for (let k = Math.floor(data.theta.length * 0.12); k < data.theta.length * 0.93; k += 3) {
      const value = curve.values[k];
      if (!inside(value)) continue;
      const x = thetaX(size, data.theta[k]!);
      const y = valueY(size, value, data.range);
      for (const dy of [-9, 18]) {
        const at = y + dy;
        if (at < size.top + 12 || at > size.bottom - 4) continue;
        const anchor = x > (size.left + size.right) / 2 ? ('end' as const) : ('start' as const);
        const reach = curve.name.length * 7;
        if (anchor === 'start' ? x + reach > size.right : x - reach < size.left) continue;
        const others = data.curves.flatMap((other, j) => {
          const there = other.values[k];
          return j === index || !inside(there) ? [] : [Math.abs(valueY(size, there, data.range) - at + 4)];
        });
        const names = taken.map(
          (place) => Math.max(Math.abs(place.y - at) / 16, Math.abs(place.x - x) / (reach + 20)) * 30,
        );
        const room = Math.min(60, ...others, ...names) - (dy > 0 ? 0.5 : 0);
        if (room > bestRoom) {
          bestRoom = room;
          best = { x, y: at, anchor };
        }
      }
    }
    if (best) taken.push(best);
    return best;
  });
}

function Drawing({ data, size, id }: { data: ThetaPlotData; size: PlotSize; id: string }) {
  const places = namePlaces(size, data);
  return (
    <ThetaFrame
      size={size}
      title={data.title}
      label={data.label}
      range={data.range}
      ticks={ticksOf(data.range)}
      growthAbove={data.growthAbove}
      reference={data.reference}
      clip={id}
      over={data.curves.map((curve, k) => {
        const place = places[k];
        return (
          place && (
            <text key={curve.name} x={place.x} y={place.y} className="p-l" textAnchor={place.anchor}>
              {curve.name}
            </text>
          )
        );
      })}
    >
      {data.curves
        .toReversed()
        .map((curve) =>
          polyline(size, data.theta, curve.values, data.range).map((points, k) => (
            <polyline key={`${curve.name}:${k}`} points={points} className={`p-line ${curve.look}`} />
          )),
        )}
    </ThetaFrame>
  );
}

/** A plot against the phase angle, drawn for a page and for a phone. */
export function ThetaPlot({ data, id }: { data: ThetaPlotData; id: string }) {
  return (
    <>
      <div className="pl-d">
        <Drawing data={data} size={WIDE_PLOT} id={`${id}-d`} />
      </div>
      <div className="pl-m">
        <Drawing data={data} size={NARROW_PLOT} id={`${id}-m`} />
      </div>
    </>
  );
}
