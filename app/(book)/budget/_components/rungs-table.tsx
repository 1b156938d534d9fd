import { factorText, shareText } from '@/lib/budgets/budget-words';
import type { Rung, RunCosting, Subject, Tolerance } from '@/lib/budgets/run';
import { bytesText, countText, durationText, lengthText } from '@/lib/budgets/units';
import { worstGrowth } from '@/lib/budgets/worst-growth';
import { decimalText } from '@/lib/facts/reading-texts';

const HEADS: Readonly<Record<string, string>> = { '2': 'twice Δx', '1': 'as asked', '0.5': 'Δx ÷ 2', '0.25': 'Δx ÷ 4' };
const MESH_LINES = [4, 8, 16, 32];

interface Row {
  readonly head: React.ReactNode;
  readonly strong?: boolean;
  readonly text: (costing: RunCosting) => string;
  readonly number: (costing: RunCosting) => number;
}

function rowsOf(subject: Subject, tolerance: Tolerance, node: string, errorHead: string): Row[] {
  const { arraysInPlace } = subject.facts.storage;
  return [
    {
      head: (
        <>
          Spacing Δ<i>x</i>
        </>
      ),
      text: ({ spacing }) => lengthText(spacing),
      number: ({ spacing }) => spacing,
    },
    {
      head: 'Points a wavelength',
      text: ({ pointsPerWave }) => pointsPerWave.toFixed(1),
      number: ({ pointsPerWave }) => pointsPerWave,
    },
    { head: 'Points', text: ({ points }) => countText(points), number: ({ points }) => points },
    {
      head: (
        <>
          Step Δ<i>t</i>
        </>
      ),
      text: ({ step }) => durationText(step),
      number: ({ step }) => step,
    },
    { head: 'Steps', text: ({ steps }) => countText(steps), number: ({ steps }) => steps },
    {
      head: `Memory, ${arraysInPlace} ${arraysInPlace === 1 ? 'array' : 'arrays'}`,
      strong: true,
      text: ({ memory }) => bytesText(memory),
      number: ({ memory }) => memory,
    },
    { head: 'Bytes moved', text: ({ bytes }) => bytesText(bytes), number: ({ bytes }) => bytes },
    { head: 'Operations', text: ({ operations }) => countText(operations), number: ({ operations }) => operations },
    {
      head: `Time at ${node}`,
      strong: true,
      text: ({ seconds }) => durationText(seconds),
      number: ({ seconds }) => seconds,
    },
    {
      head: errorHead,
      strong: true,
      text: (costing) => shareText(costing, tolerance),
      number: ({ drift, error }) => (tolerance.kind === 'angle' ? drift : error),
    },
  ];
}

function Mesh({ lines }: { lines: number }) {
  const at = Array.from({ length: lines + 1 }, (_, k) => ((72 * k) / lines).toFixed(2));
  const wave = Array.from(
    { length: 73 },
    (_, x) => `${x} ${(36 - 26 * Math.sin((2 * Math.PI * x) / 72)).toFixed(1)}`,
  ).join('L');
  return (
    <svg width="74" height="74" viewBox="-1 -1 74 74" aria-hidden="true">
      <path
        d={at.map((x) => `M${x} 0V72M0 ${x}H72`).join('')}
        className="mesh-line"
        strokeWidth={lines < 8 ? 1.2 : 0.8}
      />
      <path d={`M${wave}`} className="mesh-halo" />
      <path d={`M${wave}`} className="mesh-wave" />
    </svg>
  );
}

interface RungsProps {
  rungs: readonly Rung[];
  subject: Subject;
  tolerance: Tolerance;
  symbol: string;
  node: string;
  errorHead: string;
}

/** The ladder of halvings: what each rung costs, and what each halving changes. */
export function RungsTable({ rungs, subject, tolerance, symbol, node, errorHead }: RungsProps) {
  const last = rungs.at(-1)!;
  const before = rungs.at(-2)!;
  const here = (factor: number) => (factor === 1 ? 'r here' : 'r');
  const rows = rowsOf(subject, tolerance, node, errorHead);
  return (
    <table className="rungs">
      <thead>
        <tr>
          <th scope="col">
            <span className="sr-only">Quantity</span>
          </th>
          {rungs.map(({ factor }) => (
            <th key={factor} scope="col" className={here(factor)}>
              {HEADS[String(factor)]}
            </th>
          ))}
          <th scope="col" className="r">
            each halving
          </th>
        </tr>
      </thead>
      <tbody>
        <tr className="mesh">
          <th scope="row">Mesh, not to scale</th>
          {rungs.map(({ factor }, k) => (
            <td key={factor} className={here(factor)}>
              <Mesh lines={MESH_LINES[k]!} />
            </td>
          ))}
          <td className="r fac" />
        </tr>
        {rows.map(({ head, strong, text, number }, k) => (
          <tr key={k} className={strong ? 'strong' : undefined}>
            <th scope="row">{head}</th>
            {rungs.map(({ factor, scaled }) => (
              <td key={factor} className={here(factor)}>
                {text(scaled)}
              </td>
            ))}
            <td className="r fac">{factorText(number(before.scaled), number(last.scaled))}</td>
          </tr>
        ))}
        <tr>
          <th scope="row">
            <span className="m">{symbol}</span> if Δ<i>t</i> is kept
          </th>
          {rungs.map(({ factor, stepKept }) => (
            <td key={factor} className={stepKept.stable ? here(factor) : `${here(factor)} cellbad`}>
              <span className={stepKept.stable ? undefined : 'fail'}>{decimalText(stepKept.parameter)}</span>
              {!stepKept.stable && <PastBound subject={subject} parameter={stepKept.parameter} />}
            </td>
          ))}
          <td className="r fac">{factorText(before.stepKept.parameter, last.stepKept.parameter)}</td>
        </tr>
      </tbody>
    </table>
  );
}

function PastBound({ subject, parameter }: { subject: Subject; parameter: number }) {
  const growth = worstGrowth(subject.numeric, parameter);
  return <small className="past">past a bound{growth > 1.0005 ? `: × ${decimalText(growth, 3)} a step` : ''}</small>;
}
