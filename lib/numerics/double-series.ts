/** Truncated power series in two variables (a parameter p and a wavenumber t) with complex doubles. */

export interface DoubleSeries {
  /** Powers 0 … jMax of p, 0 … kMax of t; the coefficient of p^j t^k at j * (kMax + 1) + k. */
  readonly jMax: number;
  readonly kMax: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export const doubleSeries = (jMax: number, kMax: number): DoubleSeries => ({
  jMax,
  kMax,
  re: new Float64Array((jMax + 1) * (kMax + 1)),
  im: new Float64Array((jMax + 1) * (kMax + 1)),
});

export function multiply(a: DoubleSeries, b: DoubleSeries): DoubleSeries {
  const { jMax, kMax } = a;
  const width = kMax + 1;
  const out = doubleSeries(jMax, kMax);
  for (let j = 0; j <= jMax; j++)
    for (let k = 0; k <= kMax; k++) {
      const re = a.re[j * width + k]!;
      const im = a.im[j * width + k]!;
      if (re === 0 && im === 0) continue;
      for (let m = 0; j + m <= jMax; m++)
        for (let n = 0; k + n <= kMax; n++) {
          const x = b.re[m * width + n]!;
          const y = b.im[m * width + n]!;
          const at = (j + m) * width + k + n;
          out.re[at]! += re * x - im * y;
          out.im[at]! += re * y + im * x;
        }
    }
  return out;
}

export function addScaled(a: DoubleSeries, b: DoubleSeries, re: number, im: number): DoubleSeries {
  const out = { ...a, re: a.re.slice(), im: a.im.slice() };
  for (let k = 0; k < out.re.length; k++) {
    out.re[k]! += b.re[k]! * re - b.im[k]! * im;
    out.im[k]! += b.re[k]! * im + b.im[k]! * re;
  }
  return out;
}

/** ln of a series whose constant term is not 0, less the logarithm of that term. */
export function logarithm(a: DoubleSeries): DoubleSeries {
  const r2 = a.re[0]! ** 2 + a.im[0]! ** 2;
  const u = addScaled(doubleSeries(a.jMax, a.kMax), a, a.re[0]! / r2, -a.im[0]! / r2);
  u.re[0] = 0;
  u.im[0] = 0;
  let power = u;
  let out = doubleSeries(a.jMax, a.kMax);
  for (let n = 1; n <= a.jMax + a.kMax; n++) {
    out = addScaled(out, power, (n % 2 === 1 ? 1 : -1) / n, 0);
    power = multiply(power, u);
  }
  return out;
}
