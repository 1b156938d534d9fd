/** The shortlist as rows of a table for other programs. */
import { csvLine } from '@/lib/ledger/csv-line';
import type { Shortlist } from './shortlist';

const HEADS = [
  'rank',
  'call number',
  'title',
  'fits',
  'fails on',
  'points a wavelength',
  'parameter of the fastest speed',
  'steps a wavelength',
  'bytes a wavelength',
  'operations a wavelength',
  'array elements',
  'measure, best = 1',
  'order in time',
  'order in space',
  'arrays',
  'halo',
  'state',
  'why',
];

const number = (value: number | undefined | null) =>
  value === undefined || value === null ? '' : String(Number(value.toPrecision(6)));

export function shortlistCsv({ fits, misses }: Shortlist): string {
  return [...fits, ...misses]
    .map(({ candidate, cost, fails, relative, reason }, k) =>
      csvLine([
        fails.length === 0 ? String(k + 1) : '',
        candidate.callNumber,
        candidate.title,
        fails.length === 0 ? 'yes' : 'no',
        fails.join(' '),
        number(cost?.pointsPerWave),
        number(cost?.parameter),
        number(cost?.stepsPerWave),
        number(cost?.bytes),
        number(cost?.operations),
        number(cost?.memory),
        number(relative),
        String(candidate.facts.order.pT ?? ''),
        String(candidate.facts.order.pX ?? ''),
        String(candidate.facts.storage.arraysInPlace),
        (candidate.facts.halo[0] ?? [0, 0]).join(' | '),
        candidate.state,
        reason,
      ]),
    )
    .reduce((text, line) => text + line, csvLine(HEADS));
}
