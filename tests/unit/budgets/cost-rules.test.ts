import { describe, expect, it } from 'vitest';
import { costOfRun, ladder, parameterOf, stepOf } from '@/lib/budgets/run';
import type { Equation } from '@/lib/numerics/equation';
import { compileScheme } from '@/lib/numerics/numeric-scheme';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import { Definition } from '@/lib/entries/definition';
import rules from '../../reference/values/cost-rules.json';
import { kernelInput } from '../../kernels/kernel-cases';
import { aRun, CASE_OF, HYPERDIFFUSION, subjectOfCase } from './subjects';

function numericOf(equation: string) {
  const name = CASE_OF[equation as Equation];
  const definition = name ? kernelInput(name).definition : Definition.parse(HYPERDIFFUSION);
  if (definition.kind !== 'scheme') throw new Error('not a scheme');
  return compileScheme(canonicalScheme(definition).scheme!);
}

describe(`rules of thumb of the trade (${rules.source})`, () => {
  it.each(rules.halvingAtFixedStep)('halving the spacing with the step kept: $rule', ({ equation, ratio }) => {
    const scheme = numericOf(equation);
    const step = stepOf(0.1, 2, 3, scheme);
    expect(parameterOf(step, 1, 3, scheme) / parameterOf(step, 2, 3, scheme)).toBeCloseTo(ratio, 12);
  });

  it.each(rules.halvingAtFixedNumber)(
    'halving the spacing with the number kept: $equation costs × $work of the work and × $memory of the memory',
    ({ equation, dims, work, memory }) => {
      const subject = subjectOfCase(CASE_OF[equation as Equation]!);
      const [, asked, half] = ladder(aRun(dims), subject, 1, subject.bound * 0.9).map(({ scaled }) => scaled);
      expect(half!.bytes / asked!.bytes).toBeCloseTo(work, 1);
      expect(half!.operations / asked!.operations).toBeCloseTo(work, 1);
      expect(Math.abs(half!.memory / asked!.memory / memory - 1)).toBeLessThan(0.01);
    },
  );

  it.each(rules.errorByHalving)(
    'halving the spacing divides the error of order $order by $ratio',
    ({ order, ratio }) => {
      const subject = subjectOfCase(order === 2 ? 'leapfrog2' : 'rk4c4');
      const run = aRun(1, { wavelength: 100, time: 1000 });
      const [coarse, fine] = [1, 0.5].map((spacing) => costOfRun(run, subject, spacing, subject.bound * 0.4));
      expect(coarse!.error / fine!.error / ratio).toBeCloseTo(1, 1);
    },
  );

  it.each(rules.relativePhaseError)(
    'a centred difference of order $order loses $error of the phase on $points points a wave, at short steps',
    ({ order, points, error }) => {
      const subject = subjectOfCase(order === 2 ? 'leapfrog2' : 'leapfrog4');
      // One period, so that the drift is 360° times the relative error of the phase speed.
      const run = aRun(1, { wavelength: points, time: points });
      expect(costOfRun(run, subject, 1, 0.002).drift / 360 / error).toBeCloseTo(1, 3);
    },
  );
});
