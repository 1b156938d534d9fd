/** The marching rule of a definition as LaTeX, as a reader would write it by hand. */
import type { Definition, LinesScheme, StencilDefinition } from '@/lib/entries/definition';
import type { CanonicalTerm, ScalarScheme } from '@/lib/numerics/canonical-scheme';
import type { Equation } from '@/lib/numerics/equation';
import { type Rational, formatRational, isZero, neg, rational, toNumber, ZERO } from '@/lib/numerics/rational';
import { canonicalScheme } from './canonical-scheme';
import { type CanonicalStencil, canonicalStencil } from './canonical-stencil';
import { type ExactTimeMethod, readTimeMethod } from './canonical-time-method';
import { type Weighted, byPowers, lcm, letter, number, site, sum } from './sum-latex';

/** A tableau with more stages is a table of its own, not a formula. */
const TABLEAU_STAGES = 5;
/** A table with more terms is too long for one line. */
const TABLE_TERMS = 9;

const isOne = ({ coefficient }: CanonicalTerm) => {
  const [only] = coefficient;
  return (
    coefficient.length === 1 &&
    only !== undefined &&
    only.powers.every((power) => power === 0) &&
    isZero(only.im) &&
    only.re.num === only.re.den
  );
};

function tableLatex(scheme: ScalarScheme): string {
  const symbols = scheme.parameters.map(letter);
  const newest = scheme.terms.filter(({ level }) => toNumber(level) === 1);
  const older = scheme.terms
    .filter(({ level }) => toNumber(level) !== 1)
    .map((term) => ({
      ...term,
      coefficient: term.coefficient.map((one) => ({ ...one, re: neg(one.re), im: neg(one.im) })),
    }));
  const [only] = newest;
  const left = newest.length === 1 && only && isOne(only) ? site(only.offset, only.level) : byPowers(newest, symbols);
  return `${left} = ${byPowers(older, symbols)}`;
}

/** Weights over their common denominator and the spacing: (8(u₊₁ − u₋₁) …)/(12 Δx). */
function differenceLatex({ offsets, weights, operator, dims }: CanonicalStencil): string {
  const members = offsets
    .map((offset, k) => ({ offset, text: site(offset, null), weight: weights[k] ?? ZERO }))
    .filter(({ weight }) => !isZero(weight))
    .sort((a, b) => b.offset.reduce((sum, by, axis) => sum || toNumber(by) - toNumber(a.offset[axis] ?? by), 0));
  const denominator = members.reduce((all, { weight }) => lcm(all, weight.den), 1n);
  const whole: Weighted[] = members.map(({ text, weight }) => ({
    text,
    weight: rational(weight.num * (denominator / weight.den)),
  }));
  const power = operator[0]?.powers.reduce((all, one) => all + one, 0) ?? 0;
  const spacing = power === 0 ? '' : `${dims === 1 ? '\\mathrm{\\Delta} x' : 'h'}${power === 1 ? '' : `^{${power}}`}`;
  const below = [denominator === 1n ? '' : String(denominator), spacing].filter(Boolean).join('\\,');
  return below === '' ? sum(whole) : `\\frac{${sum(whole)}}{${below}}`;
}

const derivativeLatex = (powers: readonly number[]) => {
  const word = powers.map((power, axis) => 'xyz'.charAt(axis).repeat(power)).join('');
  return word === '' ? 'u' : `u_{${word}}`;
};

function stencilLatex(definition: StencilDefinition): string | null {
  const { stencil } = canonicalStencil(definition);
  if (!stencil) return null;
  const exact = stencil.operator
    .map(({ powers, coefficient }, k) => {
      const text = number(coefficient) === '1' ? '' : number(coefficient);
      return `${k > 0 ? ' + ' : ''}${text}${derivativeLatex(powers)}`;
    })
    .join('');
  if (!stencil.lhs) return `${exact}\\big|_{i} \\approx ${differenceLatex(stencil)}`;
  const unknown = stencil.lhs.offsets.map((offset, k) => ({
    text: site(offset, null).replace(/^u/, "u'"),
    weight: stencil.lhs?.weights[k] ?? ZERO,
  }));
  return `${sum(unknown)} = ${differenceLatex(stencil)}`;
}

const FACTORS: Readonly<Partial<Record<Equation, readonly string[]>>> = {
  advection: ['-c'],
  diffusion: ['\\nu'],
  'advection-diffusion': ['-c', '\\nu'],
  wave: ['c^2'],
  schrodinger: ['\\mathrm{i}\\varepsilon'],
  airy: ['-\\varepsilon'],
  hyperdiffusion: ['-\\kappa'],
};

/** du_i/dt = … in space; null where the equation has several dimensions (its stencils say it better). */
function semiDiscreteLatex({ equation, space }: LinesScheme): string | null {
  const factors = FACTORS[equation];
  const stencils = space.map((one) => canonicalStencil(one).stencil);
  if (!factors || stencils.some((stencil) => stencil === null || stencil.lhs !== null)) return null;
  const terms = stencils.map((stencil, k) => {
    const factor = factors[k] ?? '';
    const text = `${factor}\\,${stencil ? differenceLatex(stencil) : ''}`;
    return k > 0 && !factor.startsWith('-') ? ` + ${text}` : ` ${text}`;
  });
  const left = equation === 'wave' ? '\\frac{d^2 u_i}{dt^2}' : '\\frac{du_i}{dt}';
  return `${left} =${terms.join('')}`;
}

function multistepLatex(
  alpha: readonly Rational[],
  terms: readonly (readonly [string, readonly Rational[]])[],
): string {
  const steps = alpha.length - 1;
  const level = (k: number) => {
    const by = k - steps + 1;
    return by === 0 ? 'n' : `n${by > 0 ? '+' : '-'}${Math.abs(by)}`;
  };
  const weighted = (name: string, values: readonly Rational[], sign: 1 | -1): Weighted[] =>
    values
      .map((weight, k) => ({ text: `${name}^{${level(k)}}`, weight: sign < 0 ? neg(weight) : weight }))
      .filter(({ weight }) => !isZero(weight))
      .reverse();
  const newest = weighted('u', alpha, 1).slice(0, 1);
  const older = weighted('u', alpha, -1).slice(1);
  const slopes = terms.map(([name, beta]) => {
    const members = weighted(name, beta, 1);
    const [only] = members;
    if (!only) return '';
    if (members.length === 1) return ` + ${sum([only], '\\mathrm{\\Delta} t')}`;
    return ` + \\mathrm{\\Delta} t\\left(${sum(members)}\\right)`;
  });
  return `${sum(newest)} = ${sum(older)}${slopes.join('')}`;
}

const cell = (value: Rational | undefined) => (value === undefined || isZero(value) ? '' : number(value));

/** Butcher's tableau; an explicit one without its empty upper half. */
function tableauLatex({ A, b, c }: Extract<ExactTimeMethod, { kind: 'runge-kutta' }>): string | null {
  if (b.length > TABLEAU_STAGES || [...A.flat(), ...b].some((value) => formatRational(value).length > 9)) return null;
  const rows = A.map((row, k) =>
    [c[k] && !isZero(c[k]) ? number(c[k]) : '0', ...b.map((_, j) => cell(row[j]))].join(' & '),
  );
  return `\\begin{array}{c|${'c'.repeat(b.length)}} ${rows.join(' \\\\ ')} \\\\ \\hline & ${b.map(cell).join(' & ')} \\end{array}`;
}

function methodLatex(method: ExactTimeMethod | null): string | null {
  if (method === null) return null;
  if (method.kind === 'runge-kutta') return tableauLatex(method);
  if (method.kind === 'multistep') return multistepLatex(method.alpha, [['f', method.beta]]);
  return multistepLatex(method.alpha, [
    ['f', method.betaExplicit],
    ['g', method.betaImplicit],
  ]);
}

/**
 * What a definition says, as LaTeX lines to be set one under the other: the table solved for its newest level;
 * for the method of lines the difference and the time method; for a stencil its difference.
 * @returns an empty list where the definition does not hold or is too long to be read as a formula
 */
export function ruleLatex(definition: Definition): string[] {
  const lines = ((): (string | null)[] => {
    if (definition.kind === 'stencil') return [stencilLatex(definition)];
    if (definition.kind === 'time-method') return [methodLatex(readTimeMethod(definition.time, '/time', []))];
    const { scheme } = canonicalScheme(definition);
    const isShort = scheme?.form === 'scalar' && scheme.terms.length <= TABLE_TERMS;
    // A multistep method on a short stencil is read best as the table that it is.
    if (definition.form === 'lines' && !(isShort && definition.time.kind === 'multistep'))
      return [semiDiscreteLatex(definition), methodLatex(readTimeMethod(definition.time, '/time', []))];
    return [scheme?.form === 'scalar' ? tableLatex(scheme) : null];
  })();
  return lines.filter((line) => line !== null);
}
