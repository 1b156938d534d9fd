'use client';

import { StaffBlocks } from '@/components/marks/staff-blocks';
import { decimalText } from '@/lib/facts/reading-texts';

const LENGTH = 337;
const HALF = 12.5;

interface Props {
  readonly label: React.ReactNode;
  readonly symbol: string;
  readonly value: number;
  readonly max: number;
  /** Largest stable value; null without end, 0 where there is none. */
  readonly limit: number | null;
  readonly onMove: (value: number) => void;
}

const LEAST = 0.01;

/** The staff as a slider: the thumb is the bubble between its ticks; arrows move 0.01, page keys 0.1. */
export function StaffSlider({ label, symbol, value, max, limit, onMove }: Props) {
  const xOf = (at: number) => (Math.min(at, max) / max) * LENGTH;
  const end = limit === null ? LENGTH : xOf(limit);
  const tenth = LENGTH / max / 10;
  const clamp = (at: number) => Math.min(max, Math.max(LEAST, Number(at.toFixed(2))));
  return (
    <label className="slide">
      <span className="lab">{label}</span>
      <span className="staffslide">
        <svg className="gauge" viewBox={`0 0 ${LENGTH} 30`} aria-hidden="true" preserveAspectRatio="none">
          {end < LENGTH && <rect x={end} y="2" width={LENGTH - end} height="25" fill="url(#hatch)" opacity=".8" />}
          {end > 0 && <StaffBlocks x={0} y={2} tenth={tenth < 5 ? tenth * 5 : tenth} half={HALF} end={end} />}
          <path d={`M0 27.5H${LENGTH}`} className="g-base" />
          {end > 0 && end < LENGTH && <path d={`M${end} 0V30`} className="g-lim" />}
        </svg>
        <span className="thumb" style={{ left: `${(Math.min(value, max) / max) * 100}%` }} aria-hidden="true">
          <b>{decimalText(value, 3)}</b>
        </span>
        <input
          type="range"
          min={LEAST}
          max={max}
          step={0.01}
          value={value}
          aria-valuetext={`${symbol} = ${decimalText(value, 3)}${limit !== null && value > limit ? ', past the bound' : ''}`}
          onChange={(event) => onMove(Number(event.target.value))}
          onKeyDown={(event) => {
            const step = event.key === 'PageUp' ? 0.1 : event.key === 'PageDown' ? -0.1 : 0;
            if (step === 0) return;
            event.preventDefault();
            onMove(clamp(value + step));
          }}
        />
      </span>
    </label>
  );
}
