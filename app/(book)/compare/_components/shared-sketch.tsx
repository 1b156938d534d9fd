import type { Facts } from '@/lib/facts/facts';
import type { FactsSummary } from '@/lib/facts/facts-summary';
import { levelLabel } from '@/lib/facts/sketch-model';

type Sketch = FactsSummary['sketch'];

const LEFT = 64;
const RIGHT = 342;
const CENTRE = 207;
const TOP = 44;
const LEVEL = 62;

/** What all sketches of a page have in common. */
export interface SharedAxes {
  readonly reach: number;
  readonly oldest: number;
}
export const sharedAxes = (sketches: readonly Sketch[]): SharedAxes => ({
  reach: Math.max(2, ...sketches.flatMap(({ sites }) => sites.map(({ offset }) => Math.ceil(Math.abs(offset))))),
  oldest: Math.min(0, ...sketches.flatMap(({ sites }) => sites.map(({ level }) => level))),
});

/** Of a scheme in stages, what one stage reads: all stages together reach farther than a sketch can say. */
export function stageSketch(sketch: Sketch, facts: Facts | null): Sketch {
  if (sketch.stages <= 1 || facts?.kind !== 'scheme') return sketch;
  const [left, right] = facts.halo[0] ?? [0, 0];
  return { ...sketch, sites: sketch.sites.filter(({ offset }) => offset >= -left && offset <= right) };
}

const offsetLabel = (offset: number) => (offset === 0 ? 'i' : `i ${offset > 0 ? '+' : '−'} ${Math.abs(offset)}`);

/** A sketch on axes that it shares with its neighbours: same columns, same levels. */
export function SharedSketch({ sketch, axes, title }: { sketch: Sketch; axes: SharedAxes; title: string }) {
  const column = Math.min(50, (RIGHT - CENTRE - 20) / axes.reach);
  const xOf = (offset: number) => CENTRE + offset * column;
  const yOf = (level: number) => TOP + (1 - level) * LEVEL;
  const levels = [...new Set(sketch.sites.map(({ level }) => level))].sort((a, b) => b - a);
  const lowest = Math.min(...levels);
  const columns = Array.from({ length: 2 * axes.reach + 1 }, (_, k) => k - axes.reach);
  const labelled = columns.filter((offset) => axes.reach <= 3 || offset % 2 === 0);
  const height = yOf(axes.oldest) + 48;
  return (
    <svg
      className="sten"
      viewBox={`0 0 360 ${height}`}
      style={{ maxWidth: 396 }}
      role="img"
      aria-label={`Sketch of ${title}`}
    >
      {levels.map((level) => (
        <g key={level}>
          <path d={`M${LEFT} ${yOf(level)}H${RIGHT}`} className={Number.isInteger(level) ? 's-level' : 's-half'} />
          {level === 1 && <path d={`M${LEFT} ${yOf(level) - 3.5}H${RIGHT}`} className="s-level" />}
          <text x={LEFT - 12} y={yOf(level) + 5.5} className="s-lv" textAnchor="end">
            {levelLabel(level)}
          </text>
          {columns.map((offset) => (
            <path key={offset} d={`M${xOf(offset)} ${yOf(level) - 6}v12`} className="s-site" />
          ))}
        </g>
      ))}
      {sketch.sites.map(({ level, offset, role }) =>
        role === 'computed' ? (
          <g key="computed">
            <rect x={xOf(offset) - 11.5} y={yOf(level) - 8.1} width="23" height="16.1" rx="8.1" className="s-new" />
            <path
              d={`M${xOf(offset) - 17.8} ${yOf(level) - 13.2}v26.4M${xOf(offset) + 17.8} ${yOf(level) - 13.2}v26.4`}
              className="s-tick"
            />
          </g>
        ) : role === 'coupled' ? (
          <rect
            key={`${level}:${offset}`}
            x={xOf(offset) - 9}
            y={yOf(level) - 6}
            width="18"
            height="12"
            rx="6"
            className="s-coup"
          />
        ) : (
          <circle
            key={`${level}:${offset}`}
            cx={xOf(offset)}
            cy={yOf(level)}
            r={column < 30 ? 5 : 7}
            className="s-known"
          />
        ),
      )}
      {sketch.stages > 1 && (
        <text x={RIGHT} y={yOf(0.5) + 5} className="s-note" textAnchor="end">
          {sketch.stages} stages
        </text>
      )}
      {labelled.map((offset) => (
        <text key={offset} x={xOf(offset)} y={yOf(lowest) + 36} className="s-off" textAnchor="middle">
          {offsetLabel(offset)}
        </text>
      ))}
    </svg>
  );
}
