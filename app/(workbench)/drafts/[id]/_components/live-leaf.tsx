'use client';

import { useMemo } from 'react';
import { Letters } from '@/components/math/letters';
import { MathText } from '@/components/math/math-text';
import { CurveTable } from '@/components/plots/curve-table';
import { ThetaPlot, type ThetaPlotData } from '@/components/plots/theta-plot';
import { decimalText } from '@/lib/facts/reading-texts';
import { capital } from '@/lib/facts/readings';
import { schemeCurves } from '@/lib/numerics/curves';
import type { NumericScheme } from '@/lib/numerics/numeric-scheme';
import { MomentsTable } from './moments-table';
import { RootsCircle } from './roots-circle';
import type { Live } from './use-live-analysis';

const POSITIONS = Array.from({ length: 129 }, (_, k) => (k * Math.PI) / 128);
const LONG_VALUE = 11;

interface LiveLeafProps {
  live: Live;
  /** Where the staff stands. */
  at: { symbol: string; value: number } | null;
}

function speedPlot(numeric: NumericScheme, symbol: string, value: number): ThetaPlotData {
  const decays = numeric.equation.includes('diffusion') && !numeric.equation.startsWith('advection');
  const looks = ['c1', 'c2', 'c3'] as const;
  const curves = [value, value / 2, value * 1.5].map((at, k) => {
    const points = schemeCurves(
      numeric,
      numeric.parameters.map(() => at),
      Array<number>(numeric.dims).fill(1),
      POSITIONS,
    );
    return {
      name: `${k === 0 ? `${symbol} = ` : ''}${decimalText(at, 3)}`,
      look: looks[k]!,
      values: points.map((point) => (decays ? point.decayRate : point.phaseSpeed)),
    };
  });
  const title = decays ? 'Decay ÷ true decay' : 'Phase speed ÷ true speed';
  return { title, label: `${title} against phase angle`, theta: POSITIONS, curves, range: [0, 1.5], reference: 1 };
}

function growthPlot(numeric: NumericScheme, symbol: string, value: number): ThetaPlotData {
  const points = schemeCurves(
    numeric,
    numeric.parameters.map(() => value),
    Array<number>(numeric.dims).fill(1),
    POSITIONS,
  );
  const name = `${symbol} = ${decimalText(value, 3)}`;
  const others = points.some(({ computational }) => computational.length > 0);
  return {
    title: 'Growth a step, |g|',
    label: `Growth a step against phase angle at ${name}`,
    theta: POSITIONS,
    curves: [
      { name, look: 'c1', values: points.map(({ modulus }) => modulus) },
      ...(others
        ? [
            {
              name: 'other roots',
              look: 'cg' as const,
              values: points.map(({ computational }) => computational[0] ?? null),
            },
          ]
        : []),
    ],
    range: [0, 1.5],
    growthAbove: 1,
  };
}

/** What the engine says of the draft while it is being written. */
export function LiveLeaf({ live, at }: LiveLeafProps) {
  const { analysis, isBehind, fault } = live;
  const numeric = analysis?.numeric ?? null;
  const plots = useMemo(
    () => (numeric && at ? [speedPlot(numeric, at.symbol, at.value), growthPlot(numeric, at.symbol, at.value)] : []),
    [numeric, at],
  );
  const problems = analysis?.problems ?? [];
  return (
    <div className={isBehind ? 'right behind' : 'right'}>
      <div className="leafhd">
        <span>Analysis, as you draw</span>
        <span role="status">{isBehind ? 'following …' : at ? `${at.symbol} = ${decimalText(at.value, 3)}` : ''}</span>
      </div>
      {fault && (
        <p className="fail small" role="alert">
          The engine gave no answer for this definition, so there are no facts. What you wrote is kept; change it, or
          load the page again.
        </p>
      )}
      {problems.length > 0 && (
        <ul className="problems" aria-label="Problems of the definition">
          {problems.map(({ pointer, severity, message }) => (
            <li key={pointer + message} className={severity === 'error' ? 'fail' : 'q'}>
              {severity === 'error' ? capital(message) : `Note: ${message}`}
            </li>
          ))}
        </ul>
      )}
      <dl className="live">
        {analysis && (numeric || analysis.verdict !== 'facts') && (
          <div className="read">
            <dt>Consistent</dt>
            <dd>{analysis.verdict === 'facts' ? 'yes' : 'no'}</dd>
            <dd>
              {analysis.verdict === 'facts'
                ? 'it tends to its equation as the grid is refined'
                : analysis.verdict === 'invalid'
                  ? 'the definition cannot be read yet'
                  : 'what is wrong stands above'}
            </dd>
          </div>
        )}
        {analysis?.readings.map(({ term, value, how }) => {
          const length = (typeof value === 'string' ? value : value.map(({ text }) => text).join('')).length;
          return (
            <div key={term} className="read">
              <dt>{term}</dt>
              <dd className={length > LONG_VALUE ? 'long' : undefined}>
                {typeof value === 'string' ? <Letters text={value} /> : <MathText runs={value} />}
              </dd>
              <dd>
                <Letters text={how} />
              </dd>
            </div>
          );
        })}
      </dl>
      {plots[0] && (
        <figure>
          <ThetaPlot data={plots[0]} id="draft-speed" />
          <CurveTable data={plots[0]} />
        </figure>
      )}
      {plots[1] && (
        <figure>
          <ThetaPlot data={plots[1]} id="draft-growth" />
          <CurveTable data={plots[1]} />
        </figure>
      )}
      {analysis && (
        <div className="liveplots">
          {numeric && at && (
            <RootsCircle
              numeric={numeric}
              parameters={numeric.parameters.map(() => at.value)}
              caption={`${at.symbol} = ${decimalText(at.value, 3)}`}
            />
          )}
          {analysis.moments.length > 0 && (
            <MomentsTable
              moments={analysis.moments}
              parameters={at && numeric ? numeric.parameters.map(() => at.value) : []}
            />
          )}
        </div>
      )}
    </div>
  );
}
