/** The value of a coefficient at a parameter, for the column beside its field. */
import type { SchemeDefinition } from '@/lib/entries/definition';
import { readExpression } from '@/lib/numerics/expression';
import { evaluate } from '@/lib/numerics/polynomial';
import { schemeVocabulary } from './scheme-vocabulary';

/**
 * Reads the texts of one definition at one value of all its parameters.
 * @returns for each text its [re, im], or null where it cannot be read or divides by zero
 */
export function weightValues(
  definition: Pick<SchemeDefinition, 'equation' | 'fixed' | 'path'>,
  texts: readonly string[],
  at: number,
): ([number, number] | null)[] {
  const vocabulary = schemeVocabulary(definition, texts, []);
  if (!vocabulary) return texts.map(() => null);
  const values = vocabulary.parameters.map(() => at);
  return texts.map((text) => {
    const outcome = readExpression(text, { variables: values.length, ...vocabulary });
    if ('problem' in outcome) return null;
    const [ar, ai] = evaluate(outcome.value.num, values);
    const [br, bi] = evaluate(outcome.value.den, values);
    const size = br * br + bi * bi;
    return size === 0 ? null : [(ar * br + ai * bi) / size, (ai * br - ar * bi) / size];
  });
}
