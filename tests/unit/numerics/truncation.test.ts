import { describe, expect, it } from 'vitest';
import { SchemeDefinition } from '@/lib/entries/definition';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import type { ScalarScheme } from '@/lib/numerics/canonical-scheme';
import { constant, evaluate, mul, variable } from '@/lib/numerics/polynomial';
import { neg, rational, sub } from '@/lib/numerics/rational';
import { analyseTruncation } from '@/lib/numerics/truncation';
import { referenceValues } from '../../support/reference-values';

interface Case {
  name: string;
  definition: unknown;
}
const SCHEMES = referenceValues<Case[]>('scheme-orders.json').flatMap(({ name, definition }) => {
  const { scheme } = canonicalScheme(SchemeDefinition.parse(definition));
  return scheme?.form === 'scalar' ? [{ name, scheme }] : [];
});
const ONE_DIMENSIONAL = SCHEMES.filter(({ scheme }) => scheme.dims === 1);

const shifted = (scheme: ScalarScheme, by: bigint): ScalarScheme => ({
  ...scheme,
  terms: scheme.terms.map((t) => ({ ...t, offset: t.offset.map((o) => sub(o, rational(by))) })),
});
const mirrored = (scheme: ScalarScheme): ScalarScheme => ({
  ...scheme,
  terms: scheme.terms.map((t) => ({ ...t, offset: t.offset.map(neg) })),
});

describe('orders of schemes', () => {
  it.each(SCHEMES)(
    'stay when all coefficients are multiplied by a number or all offsets shifted: $name',
    ({ scheme }) => {
      const before = analyseTruncation(scheme).order;
      const factor = constant(scheme.parameters.length, rational(-7, 3));
      const scaled = { ...scheme, terms: scheme.terms.map((t) => ({ ...t, coefficient: mul(t.coefficient, factor) })) };
      expect(analyseTruncation(scaled).order).toEqual(before);
      const after = analyseTruncation(shifted(scheme, 1n)).order;
      // Which mixed terms are lowest depends on the point about which the scheme is expanded; nothing else may.
      expect({ ...after, mixedLowest: [], conditionalTerms: [] }).toEqual({
        ...before,
        mixedLowest: [],
        conditionalTerms: [],
      });
    },
  );

  it.each(ONE_DIMENSIONAL)('stay when the coefficients share a factor of the parameter: $name', ({ scheme }) => {
    const factor = variable(scheme.parameters.length, 0);
    const plusOne = [...constant(scheme.parameters.length, rational(1)), ...factor];
    const multiplied = {
      ...scheme,
      terms: scheme.terms.map((t) => ({ ...t, coefficient: mul(t.coefficient, plusOne) })),
    };
    const [before, after] = [analyseTruncation(scheme).order, analyseTruncation(multiplied).order];
    expect([after.pT, after.pX, after.orderAtFixedParameter]).toEqual([
      before.pT,
      before.pX,
      before.orderAtFixedParameter,
    ]);
    expect(after.modifiedEquationLeading).toEqual(before.modifiedEquationLeading);
  });

  it.each(ONE_DIMENSIONAL.filter(({ scheme }) => scheme.equation === 'diffusion' || scheme.equation === 'wave'))(
    'stay when a scheme of an even equation is mirrored: $name',
    ({ scheme }) => {
      const [before, after] = [analyseTruncation(scheme).order, analyseTruncation(mirrored(scheme)).order];
      expect([after.pT, after.pX]).toEqual([before.pT, before.pX]);
    },
  );

  it.each(
    ONE_DIMENSIONAL.filter(
      ({ scheme }) =>
        scheme.timeOrder === 1 && scheme.parameters.length === 1 && scheme.terms.every((t) => t.level.num >= 0n),
    ),
  )('agree with ln z of the scheme at a long wave: $name', ({ scheme }) => {
    const { added } = analyseTruncation(scheme);
    const theta = 0.02;
    const value = 0.3;
    const sum = (level: bigint): [number, number] =>
      scheme.terms
        .filter((t) => t.level.num === level)
        .reduce<[number, number]>(
          ([re, im], t) => {
            const [a, b] = evaluate(t.coefficient, [value]);
            const angle = (Number(t.offset[0]!.num) / Number(t.offset[0]!.den)) * theta;
            return [re + a * Math.cos(angle) - b * Math.sin(angle), im + a * Math.sin(angle) + b * Math.cos(angle)];
          },
          [0, 0],
        );
    const [[p, q], [r, s]] = [sum(0n), sum(1n)];
    const n = -(r * r + s * s);
    const [zr, zi] = [(p * r + q * s) / n, (q * r - p * s) / n];
    const log: [number, number] = [Math.log(Math.hypot(zr, zi)), Math.atan2(zi, zr)];
    const { degree, coefficient } = added!.leading;
    const [cr, ci] = evaluate(coefficient.num, [value]);
    const turned = [
      [cr, ci],
      [-ci, cr],
      [-cr, -ci],
      [ci, -cr],
    ][degree % 4]!;
    const sigma = {
      advection: [0, -value * theta],
      diffusion: [-value * theta ** 2, 0],
      schrodinger: [0, -value * theta ** 2],
      airy: [0, value * theta ** 3],
      hyperdiffusion: [-value * theta ** 4, 0],
    }[scheme.equation as 'advection']!;
    const scaleOf = theta ** degree;
    const size = Math.hypot(cr, ci);
    // The next term is smaller by theta; rounding of ln z allows about 1e-15.
    const tolerance = 60 * theta * size * scaleOf + 4e-15;
    expect(Math.abs(log[0] - sigma[0]! - turned[0]! * scaleOf)).toBeLessThan(tolerance);
    expect(Math.abs(log[1] - sigma[1]! - turned[1]! * scaleOf)).toBeLessThan(tolerance);
  });
});
