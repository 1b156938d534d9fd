/**
 * The engine's speed as ratios measured in one run: against mathjs's generic complex functions, against SymPy, and
 * the time of all facts of schemes of every kind. Absolute figures depend on the machine and its load.
 */
import { spawnSync } from 'node:child_process';
import { create, all, type Complex } from 'mathjs';
import { analyseDefinition } from '@/lib/facts/analyse-definition';
import { SchemeDefinition } from '@/lib/entries/definition';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import { compileScheme, type NumericScheme } from '@/lib/numerics/numeric-scheme';
import { rational } from '@/lib/numerics/rational';
import { stabilityMap } from '@/lib/numerics/stability-map';
import { stencilWeights } from '@/lib/numerics/stencil-weights';
import { CASES } from '../reference/amplification-case';

const THETAS = 2048;
const VALUES = 200;

/** Processor time of the best of several rounds, milliseconds: other work on the machine does not count. */
function bestMs(rounds: number, work: () => unknown): number {
  let best = Infinity;
  for (let k = 0; k < rounds; k++) {
    const wall = performance.now();
    const processor = process.cpuUsage();
    work();
    const { user, system } = process.cpuUsage(processor);
    // Compiler and collector threads count too, hence the smaller of the two clocks.
    best = Math.min(best, performance.now() - wall, (user + system) / 1000);
  }
  return best;
}

const rows: string[][] = [['what', 'measured', 'against', 'goal', 'reached']];
function report(what: string, measured: string, against: string, goal: string, reached: boolean): void {
  rows.push([what, measured, against, goal, reached ? 'yes' : 'no']);
}

const definitionOf = (title: string) => {
  const found = CASES.find((c) => c.title === title);
  if (!found) throw new Error(`There is no reference scheme called '${title}'.`);
  return found.definition;
};
function numericOf(title: string): NumericScheme {
  const { scheme } = canonicalScheme(SchemeDefinition.parse(definitionOf(title)));
  return compileScheme(scheme!);
}

const math = create(all!, {});
/** The same map through mathjs's complex numbers, roots by the formula for degrees 1 and 2; a part of the waves only. */
function mathjsMap(scheme: NumericScheme, values: number, thetas: number): number {
  let worst = 0;
  for (let v = 0; v < values; v++)
    for (let w = 0; w < thetas; w++) {
      const theta = (w * Math.PI) / (thetas - 1);
      const levels: Complex[] = Array.from({ length: scheme.degree + 1 }, () => math.complex(0, 0));
      for (const term of scheme.terms) {
        const phase = math.exp(math.complex(0, term.offset[0]! * theta)) as unknown as Complex;
        const coefficient = term.monomials.reduce<Complex>(
          (sum, m) =>
            math.add(sum, math.multiply(math.complex(m.re, m.im), math.pow((v + 1) / values, m.powers[0]!))) as Complex,
          math.complex(0, 0),
        );
        levels[term.z] = math.add(levels[term.z]!, math.multiply(coefficient, phase)) as Complex;
      }
      if (scheme.degree === 1) {
        worst = Math.max(worst, Number(math.abs(math.divide(levels[0]!, levels[1]!) as Complex)));
        continue;
      }
      const [c, b, a] = levels as [Complex, Complex, Complex];
      const root = math.sqrt(
        math.subtract(math.multiply(b, b), math.multiply(4, math.multiply(a, c))) as Complex,
      ) as Complex;
      for (const sign of [1, -1]) {
        const z = math.divide(
          math.add(math.unaryMinus(b), math.multiply(sign, root)) as Complex,
          math.multiply(2, a) as Complex,
        ) as Complex;
        worst = Math.max(worst, Number(math.abs(z)));
      }
    }
  return worst;
}

for (const [title, name] of [
  ['Lax-Wendroff', 'map, one root, 3 points'],
  ['leapfrog in time, 4th-order central in space', 'map, two roots, 5 points'],
] as const) {
  const scheme = numericOf(title);
  const values = Float64Array.from({ length: VALUES }, (_, k) => (k + 1) / VALUES);
  const ours = bestMs(25, () => stabilityMap(scheme, values, THETAS));
  const [partValues, partThetas] = [4, 256];
  const theirs =
    (bestMs(2, () => mathjsMap(scheme, partValues, partThetas)) * VALUES * THETAS) / (partValues * partThetas);
  report(name, `${ours.toFixed(1)} ms`, `mathjs ${theirs.toFixed(0)} ms`, '<= 10 ms', ours <= 10);
  report(name, `${(theirs / ours).toFixed(0)} x`, 'mathjs', '>= 100 x', theirs / ours >= 100);
}

const nodes = (n: number) => Array.from({ length: n }, (_, k) => rational(k - (n - 1) / 2));
const weights31 = bestMs(20, () => stencilWeights(nodes(31), 2));
report('exact weights, 31 points', `${weights31.toFixed(2)} ms`, '', '<= 1 ms', weights31 <= 1);
const sympy = spawnSync(
  '/usr/bin/python3',
  [
    '-c',
    `
import time
from sympy import finite_diff_weights, Integer
best = {}
for n in (9, 15, 31):
    nodes = [Integer(k) for k in range(-(n // 2), n // 2 + 1)]
    for _ in range(3):
        t = time.perf_counter(); finite_diff_weights(2, nodes, 0); t = time.perf_counter() - t
        best[n] = min(best.get(n, t), t)
print(" ".join(str(best[n] * 1000) for n in (9, 15, 31)))
`,
  ],
  { encoding: 'utf8' },
);
if (sympy.status === 0)
  [9, 15, 31].forEach((n, k) => {
    const theirs = Number(sympy.stdout.trim().split(' ')[k]);
    const ours = bestMs(30, () => stencilWeights(nodes(n), 2));
    report(
      `exact weights, ${n} points`,
      `${(theirs / ours).toFixed(0)} x`,
      `SymPy ${theirs.toFixed(1)} ms`,
      '>= 30 x',
      theirs / ours >= 30,
    );
  });
else report('exact weights', 'not run', 'python3-sympy is not installed', '>= 30 x', false);

for (const [title, goalMs] of [
  ['Lax-Wendroff', 30],
  ['Beam-Warming second-order upwind', 30],
  ['Adams-Bashforth 3, central 2', 150],
  ['classical RK4, central 4', 150],
  ['RK3, upwind-biased 3', 150],
  ['2-D Lax-Friedrichs (four-point average)', 1000],
  ['2-D leapfrog advection', 1000],
  ['3-D staggered leapfrog 2nd order', 3000],
] as const) {
  const definition = definitionOf(title);
  const ms = bestMs(8, () => analyseDefinition(definition));
  report(`all facts: ${title}`, `${ms.toFixed(0)} ms`, '', `<= ${goalMs} ms`, ms <= goalMs);
}

/** Upwind-biased differences of odd order with the classical Runge-Kutta method: the widest polynomials of one dimension. */
const upwindRungeKutta4 = (reach: number) => ({
  kind: 'scheme',
  equation: 'advection',
  form: 'lines',
  space: [
    {
      kind: 'stencil',
      dims: 1,
      derivative: 1,
      offsets: Array.from({ length: 2 * reach }, (_, k) => String(k - reach)),
      weights: null,
    },
  ],
  time: {
    kind: 'runge-kutta',
    A: [
      ['0', '0', '0', '0'],
      ['1/2', '0', '0', '0'],
      ['0', '1/2', '0', '0'],
      ['0', '0', '1', '0'],
    ],
    b: ['1/6', '1/3', '1/3', '1/6'],
  },
});
for (const reach of [2, 3, 4]) {
  const definition = upwindRungeKutta4(reach);
  const ms = bestMs(8, () => analyseDefinition(definition));
  report(`all facts: RK4, upwind-biased ${2 * reach - 1}`, `${ms.toFixed(0)} ms`, '', '<= 150 ms', ms <= 150);
}

const widths = rows[0]!.map((_, k) => Math.max(...rows.map((r) => r[k]!.length)));
for (const row of rows) process.stdout.write(`  ${row.map((cell, k) => cell.padEnd(widths[k]!)).join('  ')}\n`);
