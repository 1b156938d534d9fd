'use client';

import { useState, type KeyboardEvent } from 'react';
import type { SketchModel } from '@/lib/facts/sketch-model';
import { isComputed, prettyWeight, siteKey, siteName, spokenSite, type Site } from './table-model';
import { useNarrow } from './use-narrow';

const WIDE = { width: 760, left: 78, right: 674, top: 66, level: 136, radius: 11.5 };
const NARROW = { width: 358, left: 56, right: 286, top: 54, level: 84, radius: 8 };
const LEVELS_HEIGHT_MAX = 480;

interface PointSketchProps {
  sites: readonly Site[];
  dims: number;
  /** How many levels and how far to each side the grid shows. */
  levels: number;
  reach: number;
  /** Components beyond the first of the slice that is shown. */
  slice: readonly number[];
  /** Array letters and halo of the scheme, where it has facts. */
  model: SketchModel | null;
  isReadOnly: boolean;
  onTurn: (level: number, offset: readonly number[]) => void;
  onEdit: (key: string) => void;
}

/** The levels with their sites, to be pressed: the draft is written by pointing. */
export function PointSketch({ sites, levels, reach, slice, model, isReadOnly, onTurn, onEdit }: PointSketchProps) {
  const m = useNarrow() ? NARROW : WIDE;
  const [active, setActive] = useState<readonly [number, number]>([0, 0]);
  const [spoken, setSpoken] = useState('');
  const byKey = new Map(sites.map((site) => [siteKey(site.level, site.offset), site]));
  const column = (m.right - m.left) / (2 * reach + 1);
  const rise = Math.min(m.level, LEVELS_HEIGHT_MAX / Math.max(1, levels - 1));
  const xOf = (by: number) => (m.left + m.right) / 2 + by * column;
  const yOf = (level: number) => m.top + (1 - level) * rise;
  const rows = Array.from({ length: levels }, (_, k) => 1 - k);
  const columns = Array.from({ length: 2 * reach + 1 }, (_, k) => k - reach);
  const bottom = yOf(2 - levels);
  const r = Math.min(m.radius, column * 0.27);
  const letters = new Map(model?.levels.map(({ level, array }) => [level, array]));
  const newest = sites.filter((site) => site.level === 1);
  const [row, place] = [Math.max(active[0], 2 - levels), Math.max(-reach, Math.min(reach, active[1]))];

  const say = (level: number, by: number, after?: string) => {
    const site = byKey.get(siteKey(level, [by, ...slice]));
    const what = isComputed(level, [by, ...slice]) ? 'the point computed' : site ? `weight ${site.weight}` : 'not read';
    setSpoken(`${spokenSite(level, [by, ...slice])}, ${after ?? what}`);
  };
  const goTo = (from: Element, level: number, by: number) => {
    setActive([level, by]);
    say(level, by);
    from.closest('svg')?.querySelector<SVGGElement>(`[data-site="${level}:${by}"]`)?.focus();
  };
  const turn = (level: number, by: number) => {
    if (isReadOnly) return;
    const offset = [by, ...slice];
    const isRead = byKey.has(siteKey(level, offset));
    onTurn(level, offset);
    say(level, by, isComputed(level, offset) ? 'the point computed' : isRead ? 'let go' : 'read, weight 0');
  };
  const onKeyDown = (event: KeyboardEvent<Element>, level: number, by: number) => {
    const moves: Record<string, readonly [number, number]> = {
      ArrowLeft: [level, Math.max(-reach, by - 1)],
      ArrowRight: [level, Math.min(reach, by + 1)],
      ArrowUp: [Math.min(1, level + 1), by],
      ArrowDown: [Math.max(2 - levels, level - 1), by],
      Home: [level, -reach],
      End: [level, reach],
    };
    const move = moves[event.key];
    if (move) goTo(event.currentTarget, ...move);
    else if (event.key === ' ') turn(level, by);
    else if (event.key === 'Enter') onEdit(siteKey(level, [by, ...slice]));
    else return;
    event.preventDefault();
    event.stopPropagation();
  };

  return (
    <>
      <svg
        className="sten draftsten"
        viewBox={`0 0 ${m.width} ${bottom + 60}`}
        style={{ maxWidth: m.width * 1.1 }}
        role="group"
        aria-label="Sites of the scheme. Arrows walk, Space reads or lets go, Enter edits the weight."
      >
        {rows.map((level) => (
          <g key={level} aria-hidden="true">
            <path d={`M${m.left} ${yOf(level)}H${m.right}`} className="s-level" />
            {level === 1 && <path d={`M${m.left} ${yOf(level) - 3.5}H${m.right}`} className="s-level" />}
            <text x={m.left - 12} y={yOf(level) + 5.5} className="s-lv" textAnchor="end">
              {siteName(level, [])}
            </text>
            {letters.get(level) && (
              <text x={m.right + 14} y={yOf(level) + 7} className="s-arr">
                {letters.get(level)}
              </text>
            )}
          </g>
        ))}
        {newest.length > 1 && (
          <path
            d={`M${m.left} ${yOf(1) - 6}H${m.right}M${m.left} ${yOf(1) + 6}H${m.right}`}
            className="s-yoke"
            aria-hidden="true"
          />
        )}
        {columns.map((by) => (
          <text key={by} x={xOf(by)} y={bottom + 40} className="s-off" textAnchor="middle" aria-hidden="true">
            {column < 40 && by % 2 !== 0 ? '' : siteName(0, [by]).replace('n, ', '')}
          </text>
        ))}
        {rows.flatMap((level) =>
          columns.map((by) => {
            const offset = [by, ...slice];
            const site = byKey.get(siteKey(level, offset));
            const computed = isComputed(level, offset);
            return (
              <g
                key={siteKey(level, offset)}
                data-site={`${level}:${by}`}
                role="checkbox"
                aria-checked={computed || site !== undefined}
                aria-disabled={computed || isReadOnly || undefined}
                aria-label={`${spokenSite(level, offset)}, ${computed ? 'computed' : site ? `weight ${site.weight}` : 'not read'}`}
                tabIndex={level === row && by === place ? 0 : -1}
                className="draftsite"
                onClick={() => {
                  setActive([level, by]);
                  turn(level, by);
                }}
                onFocus={() => setActive([level, by])}
                onKeyDown={(event) => onKeyDown(event, level, by)}
              >
                <rect
                  x={xOf(by) - column / 2}
                  y={yOf(level) - Math.min(rise / 2, 34)}
                  width={column}
                  height={Math.min(rise, 68)}
                  className="draftgoal"
                />
                <SiteMark
                  x={xOf(by)}
                  y={yOf(level)}
                  r={r}
                  kind={computed ? 'computed' : site ? (level === 1 ? 'coupled' : 'known') : 'free'}
                />
                {site &&
                  !computed &&
                  prettyWeight(site.weight).length * 8.5 <
                    column * (byKey.has(siteKey(level, [by + 1, ...slice])) ? 0.95 : 1.7) && (
                    <text
                      x={xOf(by) + Math.max(r + 4, 10)}
                      y={yOf(level) - Math.max(r + 5, 11)}
                      className="s-w"
                      aria-hidden="true"
                    >
                      {prettyWeight(site.weight)}
                    </text>
                  )}
              </g>
            );
          }),
        )}
      </svg>
      <p className="sr" aria-live="polite">
        {spoken}
      </p>
    </>
  );
}

function SiteMark({
  x,
  y,
  r,
  kind,
}: {
  x: number;
  y: number;
  r: number;
  kind: 'computed' | 'coupled' | 'known' | 'free';
}) {
  if (kind === 'known') return <circle cx={x} cy={y} r={r} className="s-known" />;
  if (kind === 'coupled')
    return <rect x={x - r * 1.5} y={y - r * 1.05} width={r * 3} height={r * 2.1} rx={r * 1.05} className="s-coup" />;
  if (kind === 'computed')
    return (
      <>
        <rect x={x - r * 1.5} y={y - r * 1.05} width={r * 3} height={r * 2.1} rx={r * 1.05} className="s-new" />
        <path
          d={`M${x - r * 2.3} ${y - r * 1.7}v${r * 3.4}M${x + r * 2.3} ${y - r * 1.7}v${r * 3.4}`}
          className="s-tick"
        />
      </>
    );
  return (
    <>
      <path d={`M${x} ${y - 6}v12`} className="s-site" />
      <circle cx={x} cy={y} r={r + 1.5} className="s-ghostpt draftghost" />
    </>
  );
}
