/** The marching rules of two definitions as LaTeX lines. */
import type { Definition } from '@/lib/entries/definition';
import { ruleLatex } from '@/lib/facts/rule-latex';

export interface Drawn {
  /** Empty where the rule is the same. */
  readonly was: readonly string[];
  readonly now: readonly string[];
}

export function drawnRule(was: Definition, now: Definition): Drawn {
  const [before, after] = [ruleLatex(was), ruleLatex(now)];
  return { was: before.join('\n') === after.join('\n') ? [] : before, now: after };
}
