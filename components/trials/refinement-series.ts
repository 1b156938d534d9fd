import type { RefinementSeries } from '@/components/plots/refinement-plot';
import type { FindingView } from '@/lib/trials/trial';
import { LANGUAGE_NAMES } from './finding-rows';

const numbersOf = (value: unknown): number[] | null =>
  Array.isArray(value) && value.every((one) => typeof one === 'number') ? value : null;

/** The measured errors behind the first refinement finding that has them; languages agree to the last bits. */
export function refinementSeries(findings: readonly FindingView[]): RefinementSeries | null {
  for (const { name, language, data } of findings) {
    const grids = numbersOf(data?.grids);
    const errors = numbersOf(data?.errors);
    const slope = data?.slope;
    if (name !== 'refinement' || !grids || !errors || typeof slope !== 'number') continue;
    const steps = numbersOf(data?.marchedSteps);
    // Refined in time alone, on one grid: the steps are what was refined.
    const isInTime = steps !== null && new Set(grids).size === 1;
    return {
      name: language ? LANGUAGE_NAMES[language] : 'kernel',
      grids: isInTime ? steps : grids,
      errors,
      slope,
      ...(isInTime && { unit: 'steps' }),
    };
  }
  return null;
}
