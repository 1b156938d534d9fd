/** Exact linear systems built up one equation at a time, as moment conditions are. */
import { div, isZero, mul, ONE, sub, ZERO, type Rational } from './rational';

export type EquationOutcome = 'independent' | 'dependent' | 'inconsistent';

/** Row-reduced equations in a fixed number of unknowns; an equation that contradicts the earlier ones is not taken. */
export class LinearSystem {
  private readonly rows: { pivot: number; values: Rational[]; right: Rational }[] = [];

  constructor(readonly unknowns: number) {}

  get rank() {
    return this.rows.length;
  }

  private reduce(values: Rational[], right: Rational): Rational {
    for (const row of this.rows) {
      const factor = values[row.pivot]!;
      if (isZero(factor)) continue;
      for (let k = 0; k < this.unknowns; k++)
        if (!isZero(row.values[k]!)) values[k] = sub(values[k]!, mul(factor, row.values[k]!));
      right = sub(right, mul(factor, row.right));
    }
    return right;
  }

  /** What the equation would be beside those already taken; does not take it. */
  classify(values: readonly Rational[], right: Rational): EquationOutcome {
    const copy = [...values];
    const rest = this.reduce(copy, right);
    if (copy.some((v) => !isZero(v))) return 'independent';
    return isZero(rest) ? 'dependent' : 'inconsistent';
  }

  take(values: readonly Rational[], right: Rational): EquationOutcome {
    const copy = [...values];
    const rest = this.reduce(copy, right);
    const pivot = copy.findIndex((v) => !isZero(v));
    if (pivot < 0) return isZero(rest) ? 'dependent' : 'inconsistent';
    const inverse = div(ONE, copy[pivot]!);
    const row = { pivot, values: copy.map((v) => mul(v, inverse)), right: mul(rest, inverse) };
    for (const other of this.rows) {
      const factor = other.values[pivot]!;
      if (isZero(factor)) continue;
      other.values = other.values.map((v, k) => sub(v, mul(factor, row.values[k]!)));
      other.right = sub(other.right, mul(factor, row.right));
    }
    this.rows.push(row);
    return 'independent';
  }

  /** A copy that can be extended and thrown away. */
  copy(): LinearSystem {
    const other = new LinearSystem(this.unknowns);
    other.rows.push(...this.rows.map((row) => ({ ...row, values: [...row.values] })));
    return other;
  }

  /** The solution, or null where some unknown is free. */
  solution(): Rational[] | null {
    if (this.rank < this.unknowns) return null;
    const values = new Array<Rational>(this.unknowns).fill(ZERO);
    for (const row of this.rows) values[row.pivot] = row.right;
    return values;
  }
}
