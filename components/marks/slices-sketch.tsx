import type { SketchModel, SketchSite } from '@/lib/facts/sketch-model';

/** Oblique axes of a slice: a step along i, and a step along j. */
const AXIS_I = [62, 0] as const;
const AXIS_J = [34, -25] as const;
const SLICE_HEIGHT = 109;
const TOP = 56;
const CENTRE = 214;

interface Slice {
  readonly name: string;
  /** Which components of an offset lie in the slice. */
  readonly axes: readonly [number, number];
}
const SLICES: Readonly<Record<2 | 3, readonly Slice[]>> = {
  2: [{ name: '', axes: [0, 1] }],
  3: [
    { name: 'i, j', axes: [0, 1] },
    { name: 'i, k', axes: [0, 2] },
  ],
};

const inSlice = (site: SketchSite, { axes }: Slice) =>
  site.offset.every((component, k) => axes.includes(k as 0 | 1 | 2) || component === 0);

function SliceStack({ model, slice }: { model: SketchModel; slice: Slice }) {
  const sites = model.sites.filter((site) => inSlice(site, slice));
  const reach = Math.max(1, ...sites.flatMap((site) => slice.axes.map((k) => Math.abs(site.offset[k] ?? 0))));
  const shrink = 1 / Math.max(1, reach * 0.8);
  const place = (i: number, j: number, y: number) =>
    [CENTRE + (i * AXIS_I[0] + j * AXIS_J[0]) * shrink, y + (i * AXIS_I[1] + j * AXIS_J[1]) * shrink] as const;
  const half = reach + 0.55;
  const grid = Array.from({ length: 2 * Math.ceil(reach) + 1 }, (_, k) => k - Math.ceil(reach));
  const line = (points: readonly (readonly [number, number])[]) =>
    points.map(([x, y]) => `${x.toFixed(1)} ${y.toFixed(1)}`).join('L');
  const height = TOP + (model.levels.length - 1) * SLICE_HEIGHT + 56;

  return (
    <svg
      className="sten"
      viewBox={`0 0 400 ${height}`}
      style={{ maxWidth: 440 }}
      role="img"
      aria-label={`${slice.name ? `Slice ${slice.name}. ` : ''}${model.sentence}`}
    >
      {model.levels.map(({ level, label }, row) => {
        const y = TOP + row * SLICE_HEIGHT;
        return (
          <g key={level}>
            <path
              d={`M${line([place(-half, -half, y), place(half, -half, y), place(half, half, y), place(-half, half, y)])}Z`}
              className={Number.isInteger(level) ? 's-plane' : 's-plane s-phalf'}
            />
            {grid.map((k) => (
              <path
                key={k}
                d={`M${line([place(k, -half, y), place(k, half, y)])}M${line([place(-half, k, y), place(half, k, y)])}`}
                className="s-ghost"
              />
            ))}
            <text x="53" y={y + 35} className="s-lv" textAnchor="end">
              {label}
            </text>
            {sites
              .filter((site) => site.level === level)
              .map((site) => {
                const [x, at] = place(site.offset[slice.axes[0]] ?? 0, site.offset[slice.axes[1]] ?? 0, y);
                const key = site.offset.join(':');
                if (site.role === 'known')
                  return <circle key={key} cx={x} cy={at} r={6.5 * Math.max(shrink, 0.6)} className="s-known" />;
                if (site.role === 'coupled')
                  return <rect key={key} x={x - 9} y={at - 6.4} width="18" height="12.8" rx="6.4" className="s-coup" />;
                return (
                  <g key={key}>
                    <rect x={x - 10.1} y={at - 7.1} width="20.2" height="14.2" rx="7.1" className="s-new" />
                    <path d={`M${x - 15.8} ${at - 11.6}v23.2M${x + 15.8} ${at - 11.6}v23.2`} className="s-tick" />
                  </g>
                );
              })}
          </g>
        );
      })}
      {slice.name && (
        <text x="346" y={height - 10} className="s-lab" textAnchor="end">
          slice {slice.name}
        </text>
      )}
    </svg>
  );
}

/** Two and three dimensions: one oblique slice a level, the slices through the computed point. */
export function SlicesSketch({ model }: { model: SketchModel }) {
  if (model.dims === 1) return null;
  return (
    <div className="slices">
      {SLICES[model.dims].map((slice) => (
        <SliceStack key={slice.name} model={model} slice={slice} />
      ))}
    </div>
  );
}
