import type { SketchModel } from '@/lib/facts/sketch-model';

/** Measures of a sketch for the width it has: drawn anew for a page and for a phone, never shrunk. */
interface Measures {
  readonly width: number;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly level: number;
  readonly radius: number;
  readonly narrow: boolean;
}
const WIDE: Measures = { width: 640, left: 78, right: 554, top: 66, level: 158, radius: 11.5, narrow: false };
const NARROW: Measures = { width: 358, left: 60, right: 272, top: 54, level: 84, radius: 8, narrow: true };

const offsetLabel = (offset: number) => {
  if (offset === 0) return 'i';
  const size = Math.abs(offset);
  const text = Number.isInteger(size) ? String(size) : `${Math.floor(size) || ''}½`;
  return `i ${offset > 0 ? '+' : '−'} ${text}`;
};

function Bubble({ x, y, r }: { x: number; y: number; r: number }) {
  const [w, h] = [r * 3.05, r * 2.15];
  const gap = w / 2 + r * 0.84;
  return (
    <>
      <rect x={x - w / 2} y={y - h / 2} width={w} height={h} rx={h / 2} className="s-new" />
      <path d={`M${x - gap} ${y - r * 1.75}v${r * 3.5}M${x + gap} ${y - r * 1.75}v${r * 3.5}`} className="s-tick" />
    </>
  );
}

function Drawing({ model, measures }: { model: SketchModel; measures: Measures }) {
  const { width, left, right, top, radius, narrow } = measures;
  const reach = Math.max(2, ...model.sites.map((site) => Math.abs(site.offset[0] ?? 0)));
  const column = (right - left - (narrow ? 40 : 108)) / (2 * reach);
  const centre = narrow ? (left + right) / 2 + 4 : (left + right) / 2 + 4;
  const xOf = (offset: number) => centre + offset * column;
  const newest = model.levels[0]!.level;
  const gaps = model.levels.length - 1;
  const step = gaps > 2 ? (measures.level * 2) / gaps : measures.level;
  const rowOf = new Map(model.levels.map(({ level }, row) => [level, top + row * step]));
  const yOf = (level: number) => rowOf.get(level) ?? top + (newest - level) * step;
  const bottom = top + gaps * step;
  const r = Math.min(radius, column * 0.3);
  const whole = Array.from({ length: 2 * Math.floor(reach) + 1 }, (_, k) => k - Math.floor(reach));
  const known = model.sites.filter((site) => site.role === 'known');
  const coupled = model.sites.filter((site) => site.role === 'coupled');
  const firstBelow = model.levels[1]?.level ?? 0;
  const near = known.filter((site) => site.level === firstBelow).map((site) => site.offset[0] ?? 0);
  const fan = model.path && near.length > 0 ? { lo: Math.min(0, ...near), hi: Math.max(0, ...near) } : null;
  const depth = newest - model.levels.at(-1)!.level;
  const halo = bottom + (narrow ? 60 : 60);
  const height = halo + (narrow ? 26 : 26);
  const weightGap = Math.max(r + 4.5, 10);
  const crowded = column < 40;

  return (
    <svg
      className="sten"
      viewBox={`0 0 ${width} ${height}`}
      style={{ maxWidth: width * 1.1 }}
      role="img"
      aria-label={model.sentence}
    >
      {fan && (
        <>
          <path
            d={`M${xOf(0)} ${top}L${xOf(fan.lo)} ${yOf(firstBelow)}L${xOf(fan.hi)} ${yOf(firstBelow)}Z`}
            className="s-cone"
          />
          {gaps > 1 && (
            <path
              d={`M${xOf(fan.lo)} ${yOf(firstBelow)}L${xOf(Math.max(fan.lo * depth, -reach))} ${bottom}H${xOf(Math.min(fan.hi * depth, reach))}L${xOf(fan.hi)} ${yOf(firstBelow)}Z`}
              className="s-cone2"
            />
          )}
        </>
      )}
      {model.levels.map(({ level, label, array }) => (
        <g key={level}>
          <path d={`M${left} ${yOf(level)}H${right}`} className={Number.isInteger(level) ? 's-level' : 's-half'} />
          {level === newest && <path d={`M${left} ${yOf(level) - 3.5}H${right}`} className="s-level" />}
          <text x={left - 12} y={yOf(level) + 5.5} className="s-lv" textAnchor="end">
            {label}
          </text>
          {whole.map((offset) => (
            <path key={offset} d={`M${xOf(offset)} ${yOf(level) - 6}v12`} className="s-site" />
          ))}
          {array && (
            <text x={right + 14} y={yOf(level) + 7} className="s-arr">
              {array}
            </text>
          )}
        </g>
      ))}
      {model.stages > 1 && (
        <>
          {Array.from({ length: model.stages - 1 }, (_, k) => {
            const y = top + ((k + 1) * step) / model.stages;
            return <path key={k} d={`M${xOf(-reach)} ${y}H${xOf(reach)}`} className="s-half" />;
          })}
          <text x={right + 14} y={top + step / 2 + 5} className="s-lab">
            ×{model.stages} stages
          </text>
        </>
      )}
      {model.path && fan && (
        <path
          d={`M${xOf(0)} ${top}L${xOf(-Math.min(model.path.value * depth, reach))} ${top + (Math.min(model.path.value * depth, reach) / model.path.value) * (step * (gaps / depth))}`}
          className="s-char"
        />
      )}
      {model.path && fan && !narrow && (
        <text x={xOf(-model.path.value * 0.5) - 14} y={top + step * 0.5} className="s-note s-notec" textAnchor="end">
          path of the signal
          <tspan x={xOf(-model.path.value * 0.5) - 14} dy="16">
            at {model.path.symbol} = {model.path.value}
          </tspan>
        </text>
      )}
      {model.partsAt !== null && (
        <>
          <path
            d={`M${xOf(0)} ${yOf(model.partsAt) - 14}l5 4.6-10 4.7 10 4.7-10 4.7 10 4.7-5 4.6`}
            className="s-mode"
          />
          {!narrow && (
            <>
              <path d={`M${xOf(0) + 12} ${yOf(model.partsAt) + 16}l32 20`} className="s-lead" />
              <text x={xOf(0) + 48} y={yOf(model.partsAt) + 40} className="s-note">
                not read: two modes,
                <tspan x={xOf(0) + 48} dy="15">
                  odd and even, can part
                </tspan>
              </text>
            </>
          )}
        </>
      )}
      {coupled.length > 0 && (
        <path
          d={`M${xOf(-reach)} ${top - 3.5}H${xOf(reach)}M${xOf(-reach)} ${top + 3.5}H${xOf(reach)}`}
          className="s-yoke"
        />
      )}
      {coupled.map((site) => (
        <rect
          key={site.offset[0]}
          x={xOf(site.offset[0] ?? 0) - r * 1.6}
          y={top - r * 1.13}
          width={r * 3.2}
          height={r * 2.26}
          rx={r * 1.13}
          className="s-coup"
        />
      ))}
      <Bubble x={xOf(0)} y={top} r={r} />
      {known.map((site) => {
        const x = xOf(site.offset[0] ?? 0);
        const towardsPath = model.path !== null && (site.offset[0] ?? 0) < 0;
        return (
          <g key={`${site.level}:${site.offset[0]}`}>
            <circle cx={x} cy={yOf(site.level)} r={r} className="s-known" />
            {site.weight && !(crowded && site.weight.length > 3) && (
              <text
                x={towardsPath ? x - weightGap : x + weightGap}
                y={yOf(site.level) - weightGap - 1}
                className="s-w"
                textAnchor={towardsPath ? 'end' : 'start'}
              >
                {site.weight}
              </text>
            )}
          </g>
        );
      })}
      {whole.map((offset) => (
        <text key={offset} x={xOf(offset)} y={bottom + 36} className="s-off" textAnchor="middle">
          {crowded && offset % 2 !== 0 ? '' : offsetLabel(offset)}
        </text>
      ))}
      <path d={`M${left + (narrow ? 0 : 38)} ${halo}H${right + (narrow ? 8 : -30)}`} className="s-level" />
      {model.halo.map((cells, side) =>
        cells === 0 ? null : (
          <rect
            key={side}
            x={side === 0 ? xOf(-cells) - column * 0.32 : xOf(1) - column * 0.32}
            y={halo - 6}
            width={column * (cells - 1 + 0.64)}
            height="12"
            className="s-halo"
            fill="url(#hatchi)"
          />
        ),
      )}
      <text x={left - 12} y={halo + 5} className="s-lab" textAnchor="end">
        halo
      </text>
      <text x={right + 10} y={halo + 5} className="s-lab">
        {model.halo.join(' | ')}
      </text>
      {model.levels.some(({ array }) => array) && (
        <text x={right + 12} y={top - 24} className="s-lab">
          array
        </text>
      )}
      {model.reused && (
        <>
          <path d={`M${right + 36} ${bottom}h14a6 6 0 006-6V${top + 6}a6 6 0 00-6-6h-14`} className="s-hook" />
          <path d={`M${right + 41} ${top - 4.5}l-5 4.5 5 4.5`} className="s-hook" />
        </>
      )}
    </svg>
  );
}

/** The sketch of a one-dimensional entry: a section through the levels. */
export function SectionSketch({ model }: { model: SketchModel }) {
  return (
    <>
      <div className="only-d">
        <Drawing model={model} measures={WIDE} />
      </div>
      <div className="only-m">
        <Drawing model={model} measures={NARROW} />
        {(model.partsAt !== null || model.path) && (
          <p className="cap sketch-cap">
            {model.partsAt !== null && 'The zigzag marks the site that is not read: odd and even modes can part. '}
            {model.path && (
              <>
                Dashed: the path of the signal at <span className="m">{model.path.symbol}</span> = {model.path.value}.
              </>
            )}
          </p>
        )}
      </div>
    </>
  );
}
