import { amplificationFactors } from '@/lib/numerics/amplification';
import type { NumericScheme } from '@/lib/numerics/numeric-scheme';

const SIZE = 250;
const CENTRE = SIZE / 2;
const RADIUS = 78;
const WAVES = 121;
/** Roots farther out are drawn at the edge. */
const FARTHEST = 1.5;

interface RootsCircleProps {
  numeric: NumericScheme;
  parameters: readonly number[];
  caption: string;
}

/** The roots of every wave against the unit circle, and the angle at which each wave of the principal root should stand. */
export function RootsCircle({ numeric, parameters, caption }: RootsCircleProps) {
  const roots = Array.from({ length: WAVES }, (_, k) => {
    const theta = (Math.PI * k) / (WAVES - 1);
    const { re, im } = amplificationFactors(numeric, parameters, Array<number>(numeric.dims).fill(theta));
    return Array.from(re, (x, j): [number, number] => [x, im[j]!]);
  });
  const all = roots.flat();
  const largest = Math.max(...all.map(([x, y]) => Math.hypot(x, y)));
  const at = ([x, y]: [number, number]) => {
    const size = Math.hypot(x, y);
    const shrink = size > FARTHEST ? FARTHEST / size : 1;
    return [CENTRE + RADIUS * x * shrink, CENTRE - RADIUS * y * shrink] as const;
  };
  const outside = largest > 1 + 1e-9;
  const sentence = outside
    ? `Some roots lie outside the unit circle, the farthest at ${largest.toFixed(4)}`
    : all.every(([x, y]) => Math.abs(Math.hypot(x, y) - 1) < 1e-9)
      ? 'All roots lie on the unit circle'
      : 'All roots lie within the unit circle or on it';
  return (
    <figure>
      <div className="p-yh">
        Roots <span className="m">g</span>(<span className="m">θ</span>)
      </div>
      <svg
        viewBox={`0 0 ${SIZE} ${SIZE}`}
        className="plot"
        style={{ maxWidth: SIZE }}
        role="img"
        aria-label={`${sentence}, ${caption}`}
      >
        <path d={`M8 ${CENTRE}H${SIZE - 8}M${CENTRE} 8V${SIZE - 8}`} className="p-grid" />
        <circle cx={CENTRE} cy={CENTRE} r={RADIUS} className="p-ax" fill="none" />
        {roots.flatMap((set, k) =>
          set.map((root, j) => {
            const [x, y] = at(root);
            const isOut = Math.hypot(...root) > 1 + 1e-9;
            return (
              <circle key={`${k}:${j}`} cx={x} cy={y} r={isOut ? 3 : 2.2} className={isOut ? 'rootout' : 'rootin'} />
            );
          }),
        )}
        <text x={CENTRE + RADIUS + 8} y={CENTRE - 6} className="p-t">
          1
        </text>
      </svg>
      <figcaption className="cap">{sentence}.</figcaption>
    </figure>
  );
}
