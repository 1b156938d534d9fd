/** Error against time for the run asked and the quickest others, both axes logarithmic. */
import type { LogPlotData } from '@/components/plots/log-plot';
import type { OtherWay } from '@/lib/budgets/answer-budget';
import { shareText, toleranceText } from '@/lib/budgets/budget-words';
import { costCurve } from '@/lib/budgets/other-ways';
import type { Run, Rung, RunCosting, Subject, Tolerance } from '@/lib/budgets/run';
import { durationText } from '@/lib/budgets/units';
import { decimalText } from '@/lib/facts/reading-texts';

const LOOKS = ['c1', 'c2', 'c3'] as const;
const TIMES = [
  1e-6, 1e-5, 1e-4, 1e-3, 1e-2, 0.1, 1, 10, 60, 600, 3600, 36000, 172800, 864000, 8640000, 3.15576e7, 3.15576e8,
  3.15576e9,
];

interface Asked {
  readonly name: string;
  readonly run: Run;
  readonly subject: Subject;
  readonly tolerance: Tolerance;
  readonly parameter: number;
  readonly rungs: readonly Rung[];
  readonly title: string;
  readonly node: string;
}

export function driftPlot(
  { name, run, subject, tolerance, parameter, rungs, title, node }: Asked,
  others: readonly OtherWay[],
): LogPlotData {
  const share = ({ drift, error }: RunCosting) => (tolerance.kind === 'angle' ? drift : error * 100);
  const asked = rungs.find(({ factor }) => factor === 1)!.scaled;
  const drawn = [
    { name, points: costCurve(run, subject, parameter, asked.spacing) },
    ...others.slice(0, 2).map(({ row, subject: other, costing }) => ({
      name: `${row.callNumber}, ${decimalText(costing.parameter, 2)}`,
      points: costCurve(run, other, costing.parameter, costing.spacing),
    })),
  ];
  const wanted = tolerance.kind === 'angle' ? tolerance.value : tolerance.value * 100;
  const seconds = drawn.flatMap(({ points }) => points.map((costing) => costing.seconds));
  const x: [number, number] = [Math.min(...seconds), Math.max(...seconds)];
  const y: [number, number] = [wanted / 40, Math.max(wanted * 40, 100)];
  return {
    title,
    unitX: `time at ${node}`,
    label: `${title} against time: ${drawn.map((curve) => curve.name).join(', ')}; ${toleranceText(tolerance)} take ${durationText(asked.seconds)} with ${name}`,
    x,
    y,
    ticksX: thinned(TIMES.filter((at) => at >= x[0] && at <= x[1])).map((at) => ({ at, text: durationText(at) })),
    ticksY: Array.from({ length: 14 }, (_, k) => 10 ** (k - 7))
      .filter((at) => at >= y[0] && at <= y[1])
      .map((at) => ({
        at,
        text: tolerance.kind === 'angle' ? `${Number(at.toPrecision(1))}°` : `${Number(at.toPrecision(1))} %`,
      })),
    reference: { at: wanted, text: `asked: ${toleranceText(tolerance)}` },
    curves: drawn.map((curve, k) => ({
      name: curve.name,
      look: LOOKS[k]!,
      points: curve.points
        .filter((costing) => share(costing) > 0)
        .map((costing) => [costing.seconds, share(costing)] as const),
    })),
    marks: rungs.slice(0, 3).map(({ factor, scaled }) => ({
      x: scaled.seconds,
      y: share(scaled),
      asked: factor === 1,
      text:
        factor === 1
          ? durationText(scaled.seconds)
          : `${factor === 2 ? 'twice Δx' : 'Δx ÷ 2'}: ${durationText(scaled.seconds)}, ${shareText(scaled, tolerance)}`,
    })),
  };
}

const thinned = (ticks: readonly number[]) =>
  ticks.length <= 7 ? ticks : ticks.filter((_, k) => k % Math.ceil(ticks.length / 6) === 0);
