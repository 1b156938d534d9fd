/**
 * Dissipation at a representative stable value: damping order of the principal root, Kreiss dissipativity, and
 * whether every wave keeps its modulus.
 *
 * Kreiss: |z| <= 1 − delta |theta|^2s for all waves and all roots. The exponent is that of −ln|z| of the
 * principal root at small theta, provided every root stays below 1 away from theta = 0.
 */
import { sizeOf } from './amplification';
import { principalDampingOrder } from './damping-order';
import { characteristicOf, coefficientsAt, compileScheme } from './numeric-scheme';
import type { CanonicalScheme } from './canonical-scheme';
import { complexArray, polynomialRoots, rootTolerance, type ComplexArray } from './roots';
import { formatRational, toNumber, type Rational } from './rational';
import { waveGrid } from './wave-grid';

export interface Dissipation {
  /** Parameter values at which this holds, exact text. */
  at: Record<string, string>;
  principalRootDampingOrder: number | null;
  /**
   * Largest modulus of any root over waves with |theta| > 0.2, on the grid of theta = k pi/360 in one dimension,
   * k pi/18 in two and k pi/12 in three.
   */
  maxModulusForThetaGt02: number | null;
  kreissDissipative: boolean;
  kreissOrder: number | null;
  rootsOnUnitCircleAtTheta0: number;
  conservative: boolean;
}

const POINTS_PER_PI: Readonly<Record<1 | 2 | 3, number>> = { 1: 360, 2: 18, 3: 12 };
const LONG_WAVE = 0.2;

/**
 * @param values rational, in the order of `scheme.parameters`
 * @throws {RangeError} if the scheme has no terms
 */
export function schemeDissipation(scheme: CanonicalScheme, values: readonly Rational[]): Dissipation {
  const { scalar } = characteristicOf(scheme);
  const numeric = compileScheme(scheme);
  const coefficients = coefficientsAt(numeric, values.map(toNumber));
  const size = sizeOf(coefficients);
  const grid = waveGrid(numeric, POINTS_PER_PI[numeric.dims]);
  const polynomial = complexArray(numeric.degree + 1);
  let maxModulus = 0;
  let conservative = true;
  let warm: ComplexArray | undefined;
  let rootsOnUnitCircleAtTheta0 = 0;
  for (let index = 0; index < grid.count; index++) {
    const theta = grid.theta(index);
    grid.polynomial(index, coefficients, polynomial);
    const roots = polynomialRoots(polynomial, warm);
    warm = roots;
    const atOrigin = theta.every((x) => x === 0);
    const short = Math.hypot(...theta) > LONG_WAVE;
    for (let k = 0; k < roots.re.length; k++) {
      const modulus = Math.hypot(roots.re[k]!, roots.im[k]!);
      // The error bound of a multiple root away from the circle has no end.
      const tolerance = Math.min(1e-6, 4 * rootTolerance(polynomial, roots.re[k]!, roots.im[k]!, size) + 1e-13);
      const onCircle = Math.abs(modulus - 1) <= tolerance;
      if (!onCircle) conservative = false;
      if (short) maxModulus = Math.max(maxModulus, onCircle ? 1 : modulus);
      if (atOrigin && Math.abs(modulus - 1) < Math.max(1e-9, tolerance)) rootsOnUnitCircleAtTheta0++;
    }
  }
  const order = conservative ? null : principalDampingOrder(scalar, values);
  const kreissDissipative =
    order !== null &&
    order > 0 &&
    maxModulus < 1 - 1e-12 &&
    rootsOnUnitCircleAtTheta0 === 1 &&
    numeric.stationaryRoots === 0;
  return {
    at: Object.fromEntries(scheme.parameters.map((name, k) => [name, formatRational(values[k]!)])),
    principalRootDampingOrder: order,
    maxModulusForThetaGt02: maxModulus,
    kreissDissipative,
    kreissOrder: kreissDissipative ? order : null,
    rootsOnUnitCircleAtTheta0: rootsOnUnitCircleAtTheta0 + numeric.stationaryRoots,
    conservative,
  };
}
