/** The symbol of a one-dimensional row, S(theta) = Σ w e^(i x theta) / Σ a e^(i y theta), and its slope. */
import { cosPi, sinPi } from './exact-angle';
import { mul, toNumber, type Rational } from './rational';

export interface Row {
  readonly offsets: readonly Rational[];
  readonly weights: readonly Rational[];
}

type Complex = readonly [number, number];
const times = ([a, b]: Complex, [c, d]: Complex): Complex => [a * c - b * d, a * d + b * c];
const over = ([a, b]: Complex, [c, d]: Complex): Complex => {
  const n = c * c + d * d;
  return [(a * c + b * d) / n, (b * c - a * d) / n];
};
const minus = ([a, b]: Complex, [c, d]: Complex): Complex => [a - c, b - d];

/** Division by i^m. */
function overPowerOfI([re, im]: Complex, m: number): Complex {
  const turns = ((m % 4) + 4) % 4;
  return turns === 0 ? [re, im] : turns === 1 ? [im, -re] : turns === 2 ? [-re, -im] : [-im, re];
}

export class StencilSymbol {
  private readonly x: number[];
  private readonly y: number[];
  /** Weights times the 0th and 1st power of the offset. */
  private readonly w: number[][];
  private readonly a: number[][];

  /** @param derivative m in kappa = S / i^m */
  constructor(
    readonly right: Row,
    readonly left: Row | null,
    readonly derivative: number,
  ) {
    this.x = right.offsets.map(toNumber);
    this.y = left?.offsets.map(toNumber) ?? [];
    const powers = (offsets: readonly number[], weights: readonly Rational[]) =>
      [0, 1].map((order) => weights.map((w, j) => toNumber(w) * offsets[j]! ** order));
    this.w = powers(this.x, right.weights);
    this.a = powers(this.y, left?.weights ?? []);
  }

  private sum(offsets: readonly number[], powers: readonly number[][], theta: number, order: number): Complex {
    const weights = powers[order]!;
    let re = 0;
    let im = 0;
    for (let j = 0; j < offsets.length; j++) {
      if (weights[j] === 0) continue;
      re += weights[j]! * Math.cos(offsets[j]! * theta);
      im += weights[j]! * Math.sin(offsets[j]! * theta);
    }
    return overPowerOfI([re, im], -order);
  }

  lhs(theta: number): Complex {
    return this.left ? this.sum(this.y, this.a, theta, 0) : [1, 0];
  }

  kappa(theta: number): Complex {
    const numerator = this.sum(this.x, this.w, theta, 0);
    return overPowerOfI(this.left ? over(numerator, this.lhs(theta)) : numerator, this.derivative);
  }

  /** kappa at a rational multiple of pi, with exact trigonometric values where there are some. */
  kappaAt(turns: Rational): Complex {
    const sum = (row: Row): Complex => {
      let re = 0;
      let im = 0;
      row.offsets.forEach((offset, j) => {
        const angle = mul(offset, turns);
        const weight = toNumber(row.weights[j]!);
        re += weight * cosPi(angle);
        im += weight * sinPi(angle);
      });
      return [re, im];
    };
    const numerator = sum(this.right);
    const [re, im] = overPowerOfI(this.left ? over(numerator, sum(this.left)) : numerator, this.derivative);
    return [re + 0, im + 0];
  }

  /** Derivative of Re kappa. */
  slope(theta: number): number {
    const p = this.sum(this.x, this.w, theta, 1);
    if (!this.left) return overPowerOfI(p, this.derivative)[0];
    const q = this.lhs(theta);
    const s = over(this.sum(this.x, this.w, theta, 0), q);
    return overPowerOfI(over(minus(p, times(s, this.sum(this.y, this.a, theta, 1))), q), this.derivative)[0];
  }
}
