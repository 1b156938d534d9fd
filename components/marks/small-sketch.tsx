import type { FactsSummary } from '@/lib/facts/facts-summary';

const WIDTH = 124;
const CENTRE = 62;
const COLUMN = 20;
const LEVEL = 18;
const TOP = 15;
const ROWS = 4;
const REACH = 2;

/** A column step narrow enough for the widest site to stay on the drawing. */
const columnFor = (reach: number) => (reach <= REACH ? COLUMN : (COLUMN * (REACH + 0.6)) / reach);

function sentence({ sites, stages }: FactsSummary['sketch']): string {
  const known = sites.filter((site) => site.role === 'known').length;
  const levels = new Set(sites.filter((site) => site.role === 'known').map((site) => site.level)).size;
  const coupled = sites.some((site) => site.role === 'coupled') ? ', solved together along the new level' : '';
  return `One point computed from ${known} known on ${levels} ${levels === 1 ? 'level' : 'levels'}${coupled}${stages > 1 ? `, ${stages} stages a step` : ''}`;
}

/** The sketch of a catalog line: time runs upward, all lines on the same axes. */
export function SmallSketch({ sketch }: { sketch: FactsSummary['sketch'] }) {
  const newest = Math.max(...sketch.sites.map((site) => site.level), 0);
  const depth = newest - Math.min(...sketch.sites.map((site) => site.level), newest);
  const scale = depth > ROWS - 1 ? (ROWS - 1) / depth : 1;
  const yOf = (level: number) => TOP + (newest - level) * LEVEL * scale;
  const reach = Math.max(REACH, ...sketch.sites.map((site) => Math.abs(site.offset)));
  const column = columnFor(reach);
  const xOf = (offset: number) => CENTRE + offset * column;
  const levels = [...new Set(sketch.sites.map((site) => site.level))].sort((a, b) => b - a);
  const ghosts = Array.from({ length: ROWS }, (_, row) => TOP + row * LEVEL).filter((y) =>
    levels.every((level) => Math.abs(yOf(level) - y) > 4),
  );
  const whole = Array.from({ length: 2 * Math.floor(reach) + 1 }, (_, k) => k - Math.floor(reach));
  const coupled = sketch.sites.filter((site) => site.role === 'coupled');
  const stageRules = sketch.stages > 1 ? Array.from({ length: Math.min(sketch.stages - 1, 4) }, (_, k) => k) : [];

  return (
    <svg
      className="mini"
      width={WIDTH}
      height="74"
      viewBox={`0 0 ${WIDTH} 74`}
      role="img"
      aria-label={sentence(sketch)}
    >
      {levels.map((level) => (
        <path key={level} d={`M0 ${yOf(level)}H${WIDTH}`} className={Number.isInteger(level) ? 's-level' : 's-half'} />
      ))}
      {ghosts.map((y) => (
        <path key={y} d={`M0 ${y}H${WIDTH}`} className="s-ghost" />
      ))}
      {levels.flatMap((level) =>
        whole.map((offset) => (
          <path key={`${level}:${offset}`} d={`M${xOf(offset)} ${yOf(level) - 2.5}v5`} className="s-site" />
        )),
      )}
      {stageRules.map((k) => {
        const y = TOP + 4.5 + (k * 9) / Math.max(1, stageRules.length - 1 || 1);
        return <path key={k} d={`M${xOf(-2)} ${y}H${xOf(2)}`} className="s-half" />;
      })}
      {stageRules.length > 0 && (
        <text x="121" y="28" className="s-lab" textAnchor="end">
          ×{sketch.stages}
        </text>
      )}
      {coupled.length > 0 && (
        <path
          d={`M${xOf(-reach)} ${TOP - 1.5}H${xOf(reach)}M${xOf(-reach)} ${TOP + 1.5}H${xOf(reach)}`}
          className="s-yoke"
        />
      )}
      {coupled.map((site) => (
        <rect
          key={site.offset}
          x={xOf(site.offset) - 5.4}
          y={yOf(site.level) - 3.8}
          width="10.8"
          height="7.6"
          rx="3.8"
          className="s-coup"
        />
      ))}
      {sketch.sites.map((site) =>
        site.role === 'computed' ? (
          <g key="computed">
            <rect x={xOf(site.offset) - 5.7} y={yOf(site.level) - 4} width="11.3" height="8" rx="4" className="s-new" />
            <path
              d={`M${xOf(site.offset) - 8.8} ${yOf(site.level) - 6.5}v13M${xOf(site.offset) + 8.8} ${yOf(site.level) - 6.5}v13`}
              className="s-tick"
            />
          </g>
        ) : site.role === 'known' ? (
          <circle
            key={`${site.level}:${site.offset}`}
            cx={xOf(site.offset)}
            cy={yOf(site.level)}
            r={column < 14 ? 2.8 : 4}
            className="s-known"
          />
        ) : null,
      )}
    </svg>
  );
}
