/** Random weights, orders and modified equations against SymPy (the python3-sympy package of Debian). */
import { execFileSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import { SchemeDefinition } from '@/lib/entries/definition';
import { formatRational, parseRational, rational } from '@/lib/numerics/rational';
import { stencilWeights } from '@/lib/numerics/stencil-weights';
import { analyseTruncation } from '@/lib/numerics/truncation';
import { expressionValue } from '../support/expression-value';
import { randomFrom, type Random } from '../support/random';

const python = (script: string, input: unknown): unknown =>
  JSON.parse(
    execFileSync('/usr/bin/python3', ['-I', '-c', script], { input: JSON.stringify(input), encoding: 'utf8' }),
  );

const WEIGHTS = `
import json, sys
from sympy import Rational, finite_diff_weights
answer = []
for case in json.load(sys.stdin):
    nodes = [Rational(x) for x in case["nodes"]]
    answer.append([str(w) for w in finite_diff_weights(case["derivative"], nodes, 0)[-1][-1]])
print(json.dumps(answer))
`;

/** ln z of a two-level scheme as a series: the first coefficient at which it leaves the exact exponent. */
const MODIFIED = `
import json, sys
from sympy import Rational, Symbol, exp, factorial, log, series, sympify, together, simplify, expand, Poly
X, p = Symbol("X"), Symbol("p")
answer = []
for case in json.load(sys.stdin):
    n = 8
    def level(l):
        total = 0
        for t in case["terms"]:
            if t["level"] == l:
                o = t["offset"]
                total += sympify(t["coefficient"], locals={"p": p}) * sum(Rational(o) ** k * X ** k / factorial(k) for k in range(n + 1))
        return expand(total)
    new, old = level(1), level(0)
    # z = -old/new; for consistent schemes z = 1 + d, d small
    ratio = series(together(-old / new), X, 0, n).removeO()
    d = expand(ratio - 1)
    log_z = expand(series(sum((-1) ** (k + 1) * d ** k / Rational(k) for k in range(1, n)), X, 0, n).removeO())
    sigma = sympify(case["sigma"], locals={"p": p, "X": X})
    rest = expand(log_z - sigma)
    found = None
    for k in range(n):
        c = simplify(rest.coeff(X, k))
        if c != 0:
            found = [k, str(c)]
            break
    answer.append(found)
print(json.dumps(answer))
`;

function randomNodes(random: Random) {
  const count = random.integer(2, 8);
  const texts = new Set<string>();
  while (texts.size < count) texts.add(formatRational(rational(random.integer(-20, 20), random.pick([1, 2, 3, 5]))));
  return { nodes: [...texts], derivative: random.integer(0, Math.min(6, count - 1)) };
}

/** u_t = … by forward Euler, with random differences whose moments are right, and a random extra difference of order 2. */
function randomTwoLevel(random: Random) {
  const equation = random.pick(['advection', 'diffusion'] as const);
  const derivative = equation === 'advection' ? 1 : 2;
  const all = [-2, -1, 0, 1, 2];
  while (all.length > derivative + 1 + random.integer(0, 2)) all.splice(random.integer(0, all.length - 1), 1);
  const weights = stencilWeights(
    all.map((x) => rational(x)),
    derivative,
  ).map(formatRational);
  const sign = equation === 'advection' ? '+' : '-';
  const extra = random.integer(-3, 3);
  const terms = [
    { level: 1, offset: 0, coefficient: '1' },
    { level: 0, offset: 0, coefficient: '-1' },
    ...all.map((offset, k) => ({ level: 0, offset, coefficient: `${sign}(${weights[k]})*p` })),
    ...(equation === 'advection'
      ? [-1, 0, 1].map((offset) => ({ level: 0, offset, coefficient: `(${extra}/7)*p**2*(${offset === 0 ? -2 : 1})` }))
      : []),
  ];
  return { equation, terms, sigma: equation === 'advection' ? '-p*X' : 'p*X**2' };
}

describe('against SymPy', () => {
  it('weights on random nodes are the same fractions', { timeout: 60_000 }, () => {
    const random = randomFrom(1988);
    const cases = Array.from({ length: 60 }, () => randomNodes(random));
    const due = python(WEIGHTS, cases) as string[][];
    cases.forEach(({ nodes, derivative }, k) => {
      expect(stencilWeights(nodes.map(parseRational), derivative).map(formatRational)).toEqual(due[k]);
    });
  });

  it('the leading term of the modified equation of random schemes is the same polynomial', { timeout: 120_000 }, () => {
    const random = randomFrom(1974);
    const cases = Array.from({ length: 6 }, () => randomTwoLevel(random));
    const due = python(MODIFIED, cases) as ([number, string] | null)[];
    cases.forEach(({ equation, terms }, k) => {
      const symbol = equation === 'advection' ? 'lambda' : 'r';
      const definition = SchemeDefinition.parse({
        kind: 'scheme',
        equation,
        form: 'table',
        terms: terms.map((t) => ({ ...t, coefficient: t.coefficient.replaceAll('p', symbol).replace(/^\+/, '') })),
      });
      const { scheme } = canonicalScheme(definition);
      const { modifiedEquationLeading } = analyseTruncation(scheme!).order;
      const [degree, text] = due[k]!;
      expect(modifiedEquationLeading?.powerOfITheta).toBe(degree);
      for (const value of [0.37, 1.9]) {
        const [found, expected] = [
          expressionValue(modifiedEquationLeading!.coefficient, { [symbol]: value }),
          expressionValue(text, { p: value }),
        ];
        expect(found.re).toBeCloseTo(expected.re, 11);
      }
    });
  });
});
