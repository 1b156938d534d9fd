import { describe, expect, it } from 'vitest';
import { SchemeDefinition } from '@/lib/entries/definition';
import { analyseDefinition } from '@/lib/facts/analyse-definition';
import { boundSentences } from '@/lib/facts/bound-texts';
import { DEFINITION_CHAPTERS, definitionAddress } from '@/lib/facts/definitions';
import { expressionLatex } from '@/lib/facts/expression-latex';
import type { SchemeFacts } from '@/lib/facts/facts';
import { withSymbols } from '@/lib/facts/reading-texts';
import { regionTexts } from '@/lib/facts/region-texts';
import { schemeReadings } from '@/lib/facts/scheme-readings';
import { stabilityMapModel } from '@/lib/facts/stability-map-model';
import { summarise } from '@/lib/facts/summarise';

const stencil = (derivative: number, ...offsets: string[]) => ({
  kind: 'stencil',
  dims: 1,
  derivative,
  offsets,
  weights: null,
});
const euler = { kind: 'multistep', alpha: ['-1', '1'], beta: ['1', '0'] };
const lines = (equation: string, space: unknown[], time: unknown = euler) =>
  SchemeDefinition.parse({ kind: 'scheme', equation, form: 'lines', space, time });

/** Forward in time, central in space: stable where lambda² <= 2r <= 1 (Hindmarsh, Gresho and Griffiths 1984, from memory). */
const TRANSPORT = lines('advection-diffusion', [stencil(1, '-1', '0', '1'), stencil(2, '-1', '0', '1')]);
const HEAT_2D = lines('diffusion-2d', [stencil(2, '-1', '0', '1'), stencil(2, '-1', '0', '1')]);

function factsOf(definition: SchemeDefinition): SchemeFacts {
  const { facts } = analyseDefinition(definition);
  if (facts?.kind !== 'scheme') throw new Error('The definition has no facts of a scheme.');
  return facts;
}

describe('schemes of two numbers', () => {
  const transport = factsOf(TRANSPORT);

  it('list the limit of lambda at fixed r as decimals and in closed form', () => {
    const at = transport.stability.lambdaLimitAtR!.find(({ r }) => r === '1/4')!;
    expect(at.lambdaMaxExact).toBeCloseTo(Math.SQRT1_2, 15);
    expect(at.lambdaMaxClosedForm).toBe('sqrt(2)/2');
    expect(at.intervalsLambda).toEqual([[0, at.lambdaMaxExact]]);
    expect(transport.stability.lambdaLimitAtR!.find(({ r }) => r === '1')!.intervalsLambda).toEqual([]);
  });

  it('are judged for damping at a stable pair', () => {
    const { at, kreissDissipative } = transport.dissipation!;
    expect(kreissDissipative).toBe(true);
    const [lambda, r] = [at['lambda']!, at['r']!].map((text) => {
      const [num, den] = text.split('/').map(Number);
      return num! / (den ?? 1);
    }) as [number, number];
    expect(lambda ** 2 < 2 * r && 2 * r < 1).toBe(true);
  });

  it('have their bounds in a table of lines through the region', () => {
    expect(regionTexts(transport.stability).slice(0, 3)).toEqual([
      { along: 'r = 1/20', stable: '|λ| ≤ √10/10', obtained: 'exact' },
      { along: 'r = 1/8', stable: '|λ| ≤ 1/2', obtained: 'exact' },
      { along: 'r = 1/4', stable: '|λ| ≤ √2/2', obtained: 'exact' },
    ]);
    const heat = regionTexts(factsOf(HEAT_2D).stability);
    expect(heat.map(({ stable }) => stable)).toEqual(['0 ≤ r ≤ 1/4', '0 ≤ rₓ ≤ 1/2', '0 ≤ rᵧ ≤ 1/2']);
  });

  it('have a map that agrees with the known condition in every cell away from its edge', () => {
    const map = stabilityMapModel(TRANSPORT)!;
    let told = 0;
    map.ys.forEach((r, j) =>
      map.xs.forEach((lambda, i) => {
        const margin = Math.min(2 * r - lambda ** 2, 1 - 2 * r);
        if (Math.abs(margin) < 1e-3) return;
        told++;
        expect(map.stable[j * map.xs.length + i], `${lambda}, ${r}`).toBe(margin > 0);
      }),
    );
    expect(told).toBeGreaterThan(1500);
  });

  it('have a map that shows the whole region and a margin round it', () => {
    const map = stabilityMapModel(HEAT_2D)!;
    expect(map.xs.at(-1)).toBeGreaterThan(0.5);
    expect(map.xs.at(-1)).toBeLessThan(0.8);
    expect(map.xs[0]).toBe(0);
  });

  it('of one number have no map', () => {
    expect(stabilityMapModel(lines('diffusion', [stencil(2, '-1', '0', '1')]))).toBeNull();
  });
});

describe('what a sheet says', () => {
  it.each([TRANSPORT, HEAT_2D, lines('advection', [stencil(1, '-1', '0', '1')])])(
    'gives every reading of a scheme its definition and its way',
    (definition) => {
      const facts = factsOf(definition);
      for (const { term, how, obtained } of schemeReadings(facts, summarise(definition, facts), null)) {
        expect(definitionAddress(term), term).toMatch(/^\/definitions#/);
        expect(obtained ?? how, term).not.toBe('');
      }
    },
  );

  it('has one anchor for each definition', () => {
    const ids = DEFINITION_CHAPTERS.flatMap(({ definitions }) => definitions.map(({ id }) => id));
    expect(new Set(ids).size).toBe(ids.length);
  });

  it('tells the growth of an unstable scheme and how its exponent was found', () => {
    const { stability } = factsOf(lines('advection', [stencil(1, '-1', '0', '1')]));
    expect(boundSentences(stability).join(' ')).toMatch(/goes as λ² for small λ \(the exponent is exact\)/);
  });

  it.each([
    [
      '-lambda*(lambda + 1)*(lambda - 1)/12',
      '-\\frac{\\lambda\\,\\left(\\lambda + 1\\right)\\,\\left(\\lambda - 1\\right)}{12}',
    ],
    ['I*sigma/12', '\\frac{\\mathrm{i}\\,\\sigma}{12}'],
    ['lambda_x**12*X**2', '\\lambda_{x}^{12}\\,\\partial_x^{2}'],
    ['a - b/2', 'a - b/2'],
    ['sqrt(10)/10', '\\frac{\\sqrt{10}}{10}'],
  ])('sets %s as a formula', (text, latex) => {
    expect(expressionLatex(text)).toBe(latex);
  });

  it('names numbers by their letters', () => {
    expect(withSymbols('lambda_x^2 + lambda_y^2 <= 1/2, r >= 0')).toBe('λₓ² + λᵧ² <= 1/2, r >= 0');
    expect(withSymbols('the larger number requires')).toBe('the larger number requires');
  });
});
