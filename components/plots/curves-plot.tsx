'use client';

import { useMemo, useState } from 'react';
import { decimalText } from '@/lib/facts/reading-texts';
import { schemeCurves, type CurvePoint } from '@/lib/numerics/curves';
import type { NumericScheme } from '@/lib/numerics/numeric-scheme';
import { CurveTable } from './curve-table';
import { SavePlot } from './save-plot';
import { StaffSlider } from './staff-slider';
import { ThetaPlot, type Curve, type ThetaPlotData } from './theta-plot';

const SAMPLES = 193;
const POSITIONS = Array.from({ length: SAMPLES }, (_, k) => (k * Math.PI) / (SAMPLES - 1));

interface Props {
  readonly numeric: NumericScheme;
  /** Letter of the parameter the slider moves; all parameters move together where there are several. */
  readonly symbol: string;
  /** Largest stable value; null without end, 0 where there is none. */
  readonly limit: number | null;
  /** Values at which further parameters stay; null for those that the slider moves. */
  readonly held?: readonly (number | null)[];
  /** For file names. */
  readonly slug: string;
}

/** Right end of the slider, and where it starts. */
function sliderOf(limit: number | null): { max: number; start: number } {
  if (limit === null) return { max: 4, start: 1.5 };
  if (limit === 0) return { max: 2, start: 0.75 };
  return { max: Number((limit * 1.25).toPrecision(2)), start: Number((limit * 0.75).toPrecision(3)) };
}

const column = (points: readonly CurvePoint[], pick: (point: CurvePoint) => number | null) => points.map(pick);

function growthPlot(
  points: readonly CurvePoint[],
  past: readonly CurvePoint[] | null,
  name: string,
  pastName: string,
): ThetaPlotData {
  const computational = points.some((point) => point.computational.length > 0);
  const curves: Curve[] = [{ name, look: 'c1', values: column(points, (point) => point.modulus) }];
  if (computational)
    curves.push({
      name: 'largest computational root',
      look: 'cg',
      values: column(points, (point) => point.computational[0] ?? null),
    });
  if (past) curves.push({ name: pastName, look: 'cr', values: column(past, (point) => point.maxModulus) });
  return {
    title: 'Growth a step, |g|',
    label: `Growth a step against phase angle at ${name}`,
    theta: POSITIONS,
    curves,
    range: [0, 1.5],
    growthAbove: 1,
  };
}

type Quantity = 'decayRate' | 'phaseSpeed' | 'groupSpeed';
const SPEED_TITLES: Readonly<Record<Quantity, readonly [title: string, label: string]>> = {
  decayRate: ['Decay ÷ true decay', 'Decay'],
  phaseSpeed: ['Phase speed ÷ true speed', 'Phase speed'],
  groupSpeed: ['Group speed ÷ true speed', 'Group speed'],
};
/** Group speeds turn negative on short waves. */
const SPEED_RANGES: Readonly<Record<Quantity, [number, number]>> = {
  decayRate: [0, 1.5],
  phaseSpeed: [0, 1.5],
  groupSpeed: [-1.5, 1.5],
};

function speedPlot(
  sets: readonly { name: string; points: readonly CurvePoint[] }[],
  quantity: Quantity,
): ThetaPlotData {
  const looks = ['c1', 'c2', 'c3'] as const;
  const [title, label] = SPEED_TITLES[quantity];
  return {
    title,
    label: `${label} relative to the true one against phase angle at ${sets.map((set) => set.name).join(', ')}`,
    theta: POSITIONS,
    curves: sets.map(({ name, points }, k) => ({
      name,
      look: looks[k]!,
      values: column(points, (point) => point[quantity]),
    })),
    range: SPEED_RANGES[quantity],
    reference: 1,
  };
}

/** Damping and phase speed at a parameter value that the reader moves along the staff. */
export function CurvesPlot({ numeric, symbol, limit, held, slug }: Props) {
  const { max, start } = sliderOf(limit);
  const [value, setValue] = useState(start);
  const curvesAt = useMemo(() => {
    const direction = Array.from({ length: numeric.dims }, () => 1);
    return (at: number) =>
      schemeCurves(
        numeric,
        numeric.parameters.map((_, k) => held?.[k] ?? at),
        direction,
        POSITIONS,
      );
  }, [held, numeric]);
  const decays = numeric.equation.includes('diffusion') && !numeric.equation.startsWith('advection');
  const fixed = useMemo(
    () =>
      (limit === null || limit === 0 ? [0.25, 1] : [limit / 4, limit * 0.95]).map((at) => ({
        at,
        points: curvesAt(at),
      })),
    [curvesAt, limit],
  );
  const pastAt = limit ? limit * 1.05 : null;
  const past = useMemo(() => (pastAt === null ? null : curvesAt(pastAt)), [curvesAt, pastAt]);
  const points = useMemo(() => curvesAt(value), [curvesAt, value]);
  const named = (at: number) => `${symbol} = ${decimalText(at, 3)}`;

  const growth = growthPlot(points, past, named(value), pastAt === null ? '' : `${named(pastAt)}, past the bound`);
  const sets = [
    { name: named(value), points },
    ...fixed
      .filter(({ at }) => Math.abs(at - value) > 1e-9)
      .map((set) => ({ name: named(set.at), points: set.points })),
  ];
  const speed = speedPlot(sets, decays ? 'decayRate' : 'phaseSpeed');
  const group = decays ? null : speedPlot(sets, 'groupSpeed');
  const largest = Math.max(...points.map((point) => point.maxModulus));

  return (
    <>
      <div className="slider-row">
        <StaffSlider
          label={
            <>
              {numeric.parameters.length > 1 && !held ? 'Common value of ' : 'Value of '}
              <span className="m">{symbol}</span>
            </>
          }
          symbol={symbol}
          value={value}
          max={max}
          limit={limit}
          onMove={setValue}
        />
        <output className={largest > 1 + 1e-9 ? 'small red' : 'small q'}>
          {largest > 1 + 1e-9 ? `grows ×${decimalText(largest, 5)} a step at the worst wave` : 'no wave grows'}
        </output>
      </div>
      <div className="twoup">
        <figure>
          <ThetaPlot data={growth} id={`${slug}-growth`} />
          <figcaption className="cap">Hatching marks growth. One is a wave that keeps its height.</figcaption>
          <CurveTable data={growth} />
          <SavePlot data={growth} name={`${slug}-growth`} />
        </figure>
        <figure>
          <ThetaPlot data={speed} id={`${slug}-speed`} />
          <figcaption className="cap">
            {decays
              ? 'Below one a wave decays too slowly, above one too fast.'
              : 'Below one a wave lags behind, above one it runs ahead.'}
            {numeric.dims > 1 && ' Waves along the diagonal.'}
          </figcaption>
          <CurveTable data={speed} />
          <SavePlot data={speed} name={`${slug}-speed`} />
        </figure>
      </div>
      {group && (
        <details className="numbers groupspeed">
          <summary>Group speed</summary>
          <figure className="lonefigure">
            <ThetaPlot data={group} id={`${slug}-group`} />
            <figcaption className="cap">
              Where packets of waves travel. Below zero they run against the true direction.
            </figcaption>
            <CurveTable data={group} />
            <SavePlot data={group} name={`${slug}-group-speed`} />
          </figure>
        </details>
      )}
    </>
  );
}
