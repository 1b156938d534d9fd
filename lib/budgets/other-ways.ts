/** The same run with other schemes and other steps, all at the same error. */
import { equalCostRatio, largestAdmissible, parametersToTry } from '@/lib/shortlist/candidate';
import { costOfRun, type Run, type RunCosting, shareOf, spacingFor, type Subject, type Tolerance } from './run';

/** The fastest run of a scheme that holds the tolerance, over the parameters worth trying; null where there is none. */
export function quickestRun(run: Run, subject: Subject, tolerance: Tolerance): RunCosting | null {
  let best: RunCosting | null = null;
  for (const parameter of parametersToTry(subject.bound, 0.9)) {
    // Where the grid that would take as long as the best run does not hold the error, this step cannot be quicker.
    if (best && !run.diffusion) {
      const even = best.spacing / equalCostRatio(subject.numeric, 'bytes', parameter / best.parameter);
      if (shareOf(costOfRun(run, subject, even, parameter), tolerance) > 1) continue;
    }
    const spacing = spacingFor(run, subject, parameter, tolerance);
    if (spacing === null) continue;
    const costing = costOfRun(run, subject, spacing, parameter);
    if (!best || costing.seconds < best.seconds) best = costing;
  }
  return best;
}

const CURVE_SAMPLES = 33;
/** The curve is drawn from this many halvings coarser to as many finer. */
const CURVE_HALVINGS = 3.5;

/** Time against error as the grid is refined, at one parameter, around a spacing. */
export function costCurve(run: Run, subject: Subject, parameter: number, around: number): RunCosting[] {
  return Array.from({ length: CURVE_SAMPLES }, (_, k) => {
    const halvings = CURVE_HALVINGS * ((2 * k) / (CURVE_SAMPLES - 1) - 1);
    return costOfRun(run, subject, around / 2 ** halvings, parameter);
  }).filter(({ error, pointsPerWave }) => Number.isFinite(error) && pointsPerWave >= 4);
}

export const subjectOf = ({ numeric, facts }: Omit<Subject, 'bound'>): Subject | null => {
  const bound = largestAdmissible(facts);
  return bound === null ? null : { numeric, facts, bound };
};
