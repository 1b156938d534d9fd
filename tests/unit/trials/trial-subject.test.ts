import { describe, expect, it } from 'vitest';
import { Definition } from '@/lib/entries/definition';
import { analyseDefinition } from '@/lib/facts/analyse-definition';
import type { MarchSubject, Subject } from '@/lib/trials/subject';
import { trialSubject } from '@/lib/trials/trial-subject';

function subjectOf(input: unknown): Subject {
  const definition = Definition.parse(input);
  const { facts } = analyseDefinition(definition);
  const answer = trialSubject(definition, facts!);
  if (answer.kind === 'none') throw new Error(answer.reason);
  return answer.subject;
}
const marchOf = (input: unknown) => subjectOf(input) as MarchSubject;
const table = (equation: string, rows: [string, string, string][]) => ({
  kind: 'scheme',
  form: 'table',
  equation,
  terms: rows.map(([level, offset, coefficient]) => ({ level, offset, coefficient })),
});

describe('what a trial takes from the facts', () => {
  it('tries a leapfrog scheme on both sides of its bound', () => {
    const subject = marchOf(
      table('advection', [
        ['1', '0', '1'],
        ['-1', '0', '-1'],
        ['0', '1', 'lambda'],
        ['0', '-1', '-lambda'],
      ]),
    );
    expect(subject).toMatchObject({ keptLevels: 2, halo: 1, order: 2, stable: true, checksBound: true });
    expect(subject.ends.map(({ bound, outward }) => [bound, outward])).toEqual([
      [1, 1],
      [-1, -1],
    ]);
    for (const [value] of subject.working) expect(Math.abs(value!)).toBeLessThan(1);
    expect(subject.working.some(([value]) => value! < 0)).toBe(true);
  });

  it('keeps away from the value at which explicit diffusion gains two orders', () => {
    const subject = marchOf(
      table('diffusion', [
        ['1', '0', '1'],
        ['0', '0', '-(1-2*r)'],
        ['0', '1', '-r'],
        ['0', '-1', '-r'],
      ]),
    );
    expect(subject.ends.map(({ bound }) => bound)).toEqual([0.5]);
    for (const [value] of subject.working) {
      expect(value).toBeGreaterThan(0);
      expect(Math.abs(value! - 1 / 6)).toBeGreaterThan(0.002);
    }
  });

  it('tries an unstable scheme all the same, and knows that it is one', () => {
    const subject = marchOf(
      table('advection', [
        ['1', '0', '1'],
        ['0', '0', '-1'],
        ['0', '1', 'lambda/2'],
        ['0', '-1', '-lambda/2'],
      ]),
    );
    expect(subject).toMatchObject({ stable: false, ends: [], order: 1 });
  });

  it('tries a time method on advection and diffusion, in time alone', () => {
    const subject = marchOf({
      kind: 'time-method',
      time: { kind: 'multistep', alpha: ['0', '-1', '1'], beta: ['-1/2', '3/2', '0'] },
    });
    expect(subject).toMatchObject({ keptLevels: 2, refine: 'time', order: 2 });
    expect(subject.scheme.parameters).toEqual(['lambda', 'r']);
    // The real-axis limit of AB2 is 1 (Hairer and Wanner, Solving ODEs II, section V.1), a quarter of it in r.
    expect(subject.ends.map(({ parameter, bound }) => [parameter, Math.round(bound * 1e9) / 1e9])).toEqual([
      ['r', 0.25],
    ]);
  });

  it('counts the offsets of a staggered stencil from the point on the left', () => {
    const subject = subjectOf({ kind: 'stencil', derivative: 1, offsets: ['-1/2', '1/2'], weights: ['-1', '1'] });
    expect(subject).toMatchObject({ kind: 'stencil', offsets: [0, 1], shift: 0.5, order: 2 });
  });

  it('says why there is no trial of a compact stencil', () => {
    const definition = Definition.parse({
      kind: 'stencil',
      derivative: 1,
      offsets: ['-1', '1'],
      weights: ['-3/4', '3/4'],
      lhs: { offsets: ['-1', '0', '1'], weights: ['1/4', '1', '1/4'] },
    });
    const answer = trialSubject(definition, analyseDefinition(definition).facts!);
    expect(answer).toMatchObject({ kind: 'none', reason: expect.stringMatching(/explicit/) });
  });
});
