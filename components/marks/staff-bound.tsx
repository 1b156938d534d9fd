import { decimalText } from '@/lib/facts/reading-texts';
import { StaffBlocks } from './staff-blocks';

/** What the staff of a sheet shows; every number computed by the engine or measured by a trial. */
export interface StaffReading {
  readonly symbol: string;
  /** Stable intervals clipped to what the staff shows, null for no end. */
  readonly intervals: readonly { readonly lo: number | null; readonly hi: number | null }[];
  /** Right end of the graduation. */
  readonly span: number;
  /** Words left and right of the bound. */
  readonly below: string;
  readonly beyond: string;
}

const Y = 26;
const HALF = 15;

function ticksOf(span: number, wide: boolean): number[] {
  const count = wide ? 8 : 4;
  return Array.from({ length: count + 1 }, (_, k) => (span * k) / count);
}

function Drawing({ reading, width, wide }: { reading: StaffReading; width: number; wide: boolean }) {
  const xOf = (value: number) => Math.max(0, Math.min(width, (value / reading.span) * width));
  const stretches = reading.intervals
    .map(({ lo, hi }) => ({
      from: xOf(Math.max(0, lo ?? 0)),
      to: hi === null ? width : xOf(hi),
      open: hi === null || hi > reading.span,
      starts: lo !== null && lo > 0,
    }))
    .filter(({ from, to }) => to > from);
  const last = stretches.at(-1);
  const words = last && !last.open ? last.to : null;
  const tenth = width / reading.span / 10;
  const roomLeft = words !== null && words > reading.below.length * 6.4 + 12;
  const label = `Staff of ${reading.symbol} from 0 to ${decimalText(reading.span)}: ${stretches.length === 0 ? 'stable nowhere' : stretches.map((s) => `stable from ${decimalText((s.from / width) * reading.span)} ${s.open ? 'without end' : `to ${decimalText((s.to / width) * reading.span)}`}`).join(' and ')}`;

  return (
    <svg viewBox={`0 0 ${width} 80`} className="plot" role="img" aria-label={label}>
      <rect x="0" y={Y} width={width} height={2 * HALF} fill="url(#hatch)" />
      {stretches.map((s) => (
        <g key={s.from}>
          <rect x={s.from} y={Y} width={s.to - s.from} height={2 * HALF} className="g-leaf" />
          <StaffBlocks x={s.from} y={Y} tenth={tenth < 6 ? tenth * 5 : tenth} half={HALF} end={s.to} />
          {!s.open && <path d={`M${s.to} 8V62`} className="g-lim g-wide" />}
          {s.starts && <path d={`M${s.from} 8V62`} className="g-lim g-wide" />}
        </g>
      ))}
      <path d={`M0 25.5H${width}M0 56.5H${width}`} className="g-base" />
      {ticksOf(reading.span, wide).map((value) => (
        <g key={value}>
          <path d={`M${xOf(value)} 56v6`} className="g-base" />
          <text
            x={xOf(value)}
            y="76"
            className="p-t"
            textAnchor={value === 0 ? 'start' : value === reading.span ? 'end' : 'middle'}
          >
            {decimalText(value, 3)}
          </text>
        </g>
      ))}
      {words === null ? (
        <text
          x={stretches.length === 0 ? 0 : width}
          y="18"
          textAnchor={stretches.length === 0 ? 'start' : 'end'}
          className={stretches.length === 0 ? 'p-l p-fault' : 'p-l'}
        >
          {stretches.length === 0 ? reading.beyond : reading.below}
        </text>
      ) : (
        <>
          {roomLeft && (
            <text x={words - 10} y="18" textAnchor="end" className="p-l">
              {reading.below}
            </text>
          )}
          <text
            x={words + 10 > width - 60 ? words - 10 : words + 10}
            y="18"
            textAnchor={words + 10 > width - 60 ? 'end' : 'start'}
            className="p-l p-fault"
          >
            {wide && words + 10 <= width - reading.beyond.length * 6.4 ? reading.beyond : 'grows'}
          </text>
        </>
      )}
    </svg>
  );
}

/** The staff of a sheet: ink up to the bound, red line at it, hatching beyond. */
export function StaffBound({ reading }: { reading: StaffReading }) {
  return (
    <>
      <div className="only-d">
        <Drawing reading={reading} width={1000} wide />
      </div>
      <div className="only-m">
        <Drawing reading={reading} width={358} wide={false} />
      </div>
    </>
  );
}
