/** The ladder of a budget as rows of a table for other programs, in SI units. */
import { csvLine } from '@/lib/ledger/csv-line';
import type { Rung } from './run';

const HEADS = [
  'factor on the spacing',
  'kept',
  'spacing m',
  'parameter',
  'step s',
  'steps',
  'points',
  'points a wavelength',
  'memory bytes',
  'bytes moved',
  'operations',
  'time s',
  'error, part of the wave',
  'phase drift, degrees',
  'stable',
];

export const budgetCsv = (rungs: readonly Rung[]): string =>
  rungs
    .flatMap(({ factor, scaled, stepKept }) => [
      { factor, kept: 'parameter', costing: scaled },
      { factor, kept: 'step', costing: stepKept },
    ])
    .map(({ factor, kept, costing }) =>
      csvLine([
        String(factor),
        kept,
        ...[
          costing.spacing,
          costing.parameter,
          costing.step,
          costing.steps,
          costing.points,
          costing.pointsPerWave,
          costing.memory,
          costing.bytes,
          costing.operations,
          costing.seconds,
          costing.error,
          costing.drift,
        ].map((value) => (Number.isFinite(value) ? String(Number(value.toPrecision(8))) : '')),
        costing.stable ? 'yes' : 'no',
      ]),
    )
    .reduce((text, line) => text + line, csvLine(HEADS));
