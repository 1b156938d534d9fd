/** Ten thousand random and damaged definitions: an answer to each, in the shape of the schema, without a number that is none. */
import { describe, expect, it } from 'vitest';
import { CONVENTIONS, EQUATIONS } from '@/lib/numerics/equation';
import { createBudget } from '@/lib/numerics/budget';
import { analyseDefinition } from '@/lib/facts/analyse-definition';
import { Analysis } from '@/lib/facts/facts';
import { randomFrom, type Random } from '../../support/random';
import { referenceValues } from '../../support/reference-values';

type Json = null | boolean | number | string | Json[] | { [key: string]: Json };

const JUNK: readonly Json[] = [
  null,
  true,
  -1,
  0,
  1e308,
  0.1,
  '',
  'x',
  '1/0',
  '-',
  '1e9',
  'sqrt(2)',
  '((((',
  'lambda^99',
  [],
  {},
  [[]],
  { a: 1 },
  '9'.repeat(300),
  'λ',
  '\u0000',
  '__proto__',
];

function places(value: Json, found: { holder: Json[] | { [key: string]: Json }; key: string | number }[] = []) {
  if (Array.isArray(value)) value.forEach((item, key) => (found.push({ holder: value, key }), places(item, found)));
  else if (value !== null && typeof value === 'object')
    for (const [key, item] of Object.entries(value)) {
      found.push({ holder: value, key });
      places(item, found);
    }
  return found;
}

function damaged(definition: Json, random: Random): Json {
  const copy = structuredClone(definition);
  const all = places(copy);
  for (let k = random.integer(1, 3); k > 0; k--) {
    const { holder, key } = random.pick(all);
    const act = random.integer(0, 3);
    const target = holder as { [key: string]: Json };
    if (act === 0 && !Array.isArray(holder)) delete target[key];
    else if (act === 1)
      target[key] = structuredClone(random.pick(all.map((p) => (p.holder as { [key: string]: Json })[p.key] ?? null)));
    else target[key] = random.pick(JUNK);
  }
  return copy;
}

function expression(symbols: readonly string[], random: Random, depth = 0): string {
  const kind = random.integer(0, depth > 2 ? 1 : 5);
  if (kind === 0) return random.pick(['1', '-1', '2', '1/2', '0', '1/3', '0.25']);
  if (kind === 1) return symbols.length > 0 ? random.pick(symbols) : '1';
  const [a, b] = [expression(symbols, random, depth + 1), expression(symbols, random, depth + 1)];
  return kind === 2 ? `(${a} + ${b})` : kind === 3 ? `(${a} - ${b})` : kind === 4 ? `${a}*${b}` : `(${a})/(${b})`;
}

function randomTable(random: Random): Json {
  const equation = random.pick(EQUATIONS);
  const { dims, parameters } = CONVENTIONS[equation];
  const levels = random.integer(2, 3);
  const offset = () => (dims === 1 ? random.integer(-2, 2) : Array.from({ length: dims }, () => random.integer(-1, 1)));
  const terms = Array.from({ length: random.integer(2, 6) }, (_, k) => ({
    level: k === 0 ? 1 : 1 - random.integer(k === 1 ? 1 : 0, levels - 1),
    offset: offset(),
    coefficient: expression(parameters, random),
  }));
  return { kind: 'scheme', equation, form: 'table', terms };
}

const TIME_METHODS: readonly Json[] = [
  { kind: 'runge-kutta', A: [['0']], b: ['1'] },
  { kind: 'runge-kutta', A: [['1/2']], b: ['1'] },
  {
    kind: 'runge-kutta',
    A: [
      ['0', '0', '0'],
      ['1', '0', '0'],
      ['1/4', '1/4', '0'],
    ],
    b: ['1/6', '1/6', '2/3'],
  },
  {
    kind: 'runge-kutta',
    A: [
      ['0', '0'],
      ['0.6667', '0'],
    ],
    b: ['0.25', '0.75'],
  },
  { kind: 'multistep', alpha: ['-1', '0', '1'], beta: ['0', '2', '0'] },
  { kind: 'multistep', alpha: ['0', '-1', '1'], beta: ['-1/2', '3/2', '0'] },
  { kind: 'multistep', alpha: ['1/2', '-2', '3/2'], beta: ['0', '0', '1'] },
  { kind: 'multistep', alpha: ['1', '-2', '1'], beta: ['1/12', '5/6', '1/12'] },
  {
    kind: 'imex-multistep',
    alpha: ['0', '-1', '1'],
    beta_explicit: ['-1/2', '3/2', '0'],
    beta_implicit: ['0', '1/2', '1/2'],
  },
];

/** Lines that hold by construction: derived weights of the right derivative on random offsets. */
function randomLines(random: Random): Json {
  const equation = random.pick(EQUATIONS.filter((name) => CONVENTIONS[name].dims === 1));
  const space = CONVENTIONS[equation].operators.map((derivative): Json => {
    const all = [-3, -2, -1, 0, 1, 2, 3];
    while (all.length > derivative + 1 + random.integer(0, 2)) all.splice(random.integer(0, all.length - 1), 1);
    return { kind: 'stencil', dims: 1, derivative, offsets: all.map(String), weights: null };
  });
  return { kind: 'scheme', equation, form: 'lines', space, time: random.pick(TIME_METHODS) };
}

function randomStencil(random: Random): Json {
  const count = random.integer(1, 7);
  const offsets = Array.from({ length: count }, () => `${random.integer(-6, 6)}/${random.pick([1, 1, 2, 3])}`);
  const weights =
    random.integer(0, 1) === 0 ? null : offsets.map(() => random.pick(['1', '-1', '1/2', '0.3333', '0', '-2.125']));
  const lhs =
    random.integer(0, 3) === 0
      ? { offsets: ['-1', '0', '1'], weights: random.pick([null, ['1/4', '1', '1/4'], ['1', '-2', '1']]) }
      : undefined;
  return { kind: 'stencil', dims: 1, derivative: random.integer(0, 4), offsets, weights, ...(lhs ? { lhs } : {}) };
}

function unsound(value: unknown, place = ''): string[] {
  if (typeof value === 'number') return Number.isFinite(value) ? [] : [place];
  if (typeof value === 'string') return /NaN|Infinity|undefined/.test(value) && !value.includes("'") ? [place] : [];
  if (value === null || typeof value !== 'object') return [];
  return Object.entries(value).flatMap(([key, item]) => unsound(item, `${place}/${key}`));
}

function check(definition: unknown, timeLimitMs: number) {
  const started = performance.now();
  const analysis = analyseDefinition(definition, { budget: createBudget({ timeLimitMs }) });
  const text = JSON.stringify(definition).slice(0, 600);
  expect(unsound(analysis), text).toEqual([]);
  expect(Analysis.safeParse(analysis).error?.issues ?? [], text).toEqual([]);
  if (analysis.verdict !== 'facts') expect(analysis.problems.length, text).toBeGreaterThan(0);
  // Generous: the machine may be busy; a hang is far beyond it.
  expect(performance.now() - started, text).toBeLessThan(20 * timeLimitMs + 10_000);
}

const KNOWN = [
  ...referenceValues<{ definition: Json }[]>('scheme-storage.json'),
  ...referenceValues<{ definition: Json }[]>('stencils.json'),
].map(({ definition }) => definition);

describe('any input is answered', () => {
  it('damaged definitions', { timeout: 300_000 }, () => {
    const random = randomFrom(20260311);
    for (let k = 0; k < 5600; k++) check(damaged(random.pick(KNOWN), random), 10);
  });

  it('random tables of every equation', { timeout: 300_000 }, () => {
    const random = randomFrom(7);
    for (let k = 0; k < 2300; k++) check(randomTable(random), 10);
  });

  it('random lines that hold', { timeout: 300_000 }, () => {
    const random = randomFrom(5);
    for (let k = 0; k < 300; k++) check(randomLines(random), 20);
  });

  it('random stencils', { timeout: 300_000 }, () => {
    const random = randomFrom(11);
    for (let k = 0; k < 1800; k++) check(randomStencil(random), 10);
  });

  it('what is no definition at all', () => {
    for (const junk of [...JUNK, undefined, () => 0, Symbol('x'), 10n ** 400n]) {
      const { verdict, problems } = analyseDefinition(junk);
      expect(verdict).toBe('invalid');
      expect(problems.length).toBeGreaterThan(0);
    }
  });
});
