/** A time method as exact numbers, with every reason why it cannot be read. */
import type { TimeMethod } from '@/lib/entries/definition';
import { add, equals, formatRational, isZero, rational, ZERO, type Rational } from '@/lib/numerics/rational';
import { readRational } from './canonical-stencil';
import type { Problem } from './facts';
import { hasErrors, problemAt, warningAt } from './problem';

export type ExactTimeMethod =
  | {
      readonly kind: 'runge-kutta';
      readonly A: readonly (readonly Rational[])[];
      readonly b: readonly Rational[];
      readonly c: readonly Rational[];
      /** One unit in the last printed digit of any decimal; 0 where the tableau is exact. */
      readonly ulp: Rational;
    }
  | {
      readonly kind: 'multistep';
      readonly alpha: readonly Rational[];
      readonly beta: readonly Rational[];
      readonly ulp: Rational;
    }
  | {
      readonly kind: 'imex-multistep';
      readonly alpha: readonly Rational[];
      readonly betaExplicit: readonly Rational[];
      readonly betaImplicit: readonly Rational[];
      readonly ulp: Rational;
    };

function readList(texts: readonly string[], pointer: string, problems: Problem[]): Rational[] {
  return texts.map((text, k) => readRational(text, `${pointer}/${k}`, problems) ?? ZERO);
}

function coarsestUlp(texts: readonly string[]): Rational {
  const digits = texts.flatMap((text) => {
    const match = /\.(\d+)$/.exec(text.trim());
    return match ? [match[1]!.length] : [];
  });
  return digits.length === 0 ? ZERO : rational(1n, 10n ** BigInt(Math.min(...digits)));
}

function readRungeKutta(
  time: Extract<TimeMethod, { kind: 'runge-kutta' }>,
  pointer: string,
  problems: Problem[],
): ExactTimeMethod {
  const stages = time.b.length;
  if (time.A.length !== stages)
    problems.push(
      problemAt(
        `${pointer}/A`,
        'length-mismatch',
        `A has ${time.A.length} rows but b has ${stages} weights; accepted: one row per stage`,
      ),
    );
  time.A.forEach((row, k) => {
    if (row.length !== stages)
      problems.push(
        problemAt(
          `${pointer}/A/${k}`,
          'length-mismatch',
          `row ${k + 1} of A has ${row.length} entries; accepted: ${stages}, one per stage`,
        ),
      );
  });
  if (time.c && time.c.length !== stages)
    problems.push(
      problemAt(
        `${pointer}/c`,
        'length-mismatch',
        `c has ${time.c.length} entries; accepted: ${stages}, one per stage`,
      ),
    );
  const A = time.A.map((row, k) => readList(row, `${pointer}/A/${k}`, problems));
  const b = readList(time.b, `${pointer}/b`, problems);
  const rowSums = A.map((row) => row.reduce(add, ZERO));
  const c = time.c ? readList(time.c, `${pointer}/c`, problems) : rowSums;
  const ulp = coarsestUlp([...time.A.flat(), ...time.b, ...(time.c ?? [])]);
  if (isZero(ulp))
    c.forEach((value, k) => {
      if (rowSums[k] && !equals(value, rowSums[k]))
        problems.push(
          warningAt(
            `${pointer}/c/${k}`,
            'row-sum',
            `c is ${formatRational(value)} but row ${k + 1} of A sums to ${formatRational(rowSums[k])}; the analysis of autonomous problems uses the row sum`,
          ),
        );
    });
  return { kind: 'runge-kutta', A, b, c: rowSums, ulp };
}

/** @param pointer JSON pointer of the method within the whole definition */
export function readTimeMethod(time: TimeMethod, pointer: string, problems: Problem[]): ExactTimeMethod | null {
  const before = problems.length;
  const mine = () => hasErrors(problems.slice(before));
  if (time.kind === 'runge-kutta') {
    const method = readRungeKutta(time, pointer, problems);
    return mine() ? null : method;
  }
  const alpha = readList(time.alpha, `${pointer}/alpha`, problems);
  const betas =
    time.kind === 'multistep'
      ? { beta: time.beta }
      : { beta_explicit: time.beta_explicit, beta_implicit: time.beta_implicit };
  const read = Object.entries(betas).map(([name, texts]) => {
    if (texts.length !== alpha.length)
      problems.push(
        problemAt(
          `${pointer}/${name}`,
          'length-mismatch',
          `${name} has ${texts.length} entries but alpha has ${alpha.length}; accepted: equal lengths, oldest level first`,
        ),
      );
    return readList(texts, `${pointer}/${name}`, problems);
  });
  if (isZero(alpha[alpha.length - 1]!))
    problems.push(
      problemAt(
        `${pointer}/alpha/${alpha.length - 1}`,
        'zero-leading-coefficient',
        'the last alpha belongs to the new level and must not be 0',
      ),
    );
  const lastExplicit = read[0]![alpha.length - 1];
  if (time.kind === 'imex-multistep' && lastExplicit && !isZero(lastExplicit))
    problems.push(
      problemAt(
        `${pointer}/beta_explicit/${alpha.length - 1}`,
        'not-explicit',
        'the explicit part may not use the new level; its last entry must be 0',
      ),
    );
  if (mine()) return null;
  const ulp = coarsestUlp([...time.alpha, ...Object.values(betas).flat()]);
  return time.kind === 'multistep'
    ? { kind: 'multistep', alpha, beta: read[0]!, ulp }
    : { kind: 'imex-multistep', alpha, betaExplicit: read[0]!, betaImplicit: read[1]!, ulp };
}
