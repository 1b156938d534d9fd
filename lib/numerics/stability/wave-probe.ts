/** Stability at single parameter values: the grid of waves, and the series next to theta = 0 and pi. */
import type { ScalarScheme } from '../canonical-scheme';
import { excessOf, isClearlyInside, linearExcess, sizeOf } from '../amplification';
import { coefficientsAt, polynomialFrom, type NumericScheme } from '../numeric-scheme';
import { complexArray, polynomialRoots, rootTolerance, type ComplexArray } from '../roots';
import { waveGrid, type WaveGrid } from '../wave-grid';
import { lowWaveGrowth, type LowWave } from './low-wavenumber';

/** Points per pi of the scan, and of the grids that must be clear before an end stands. */
const SCAN_PER_PI: Readonly<Record<1 | 2 | 3, number>> = { 1: 96, 2: 18, 3: 8 };
const FINE_PER_PI: Readonly<Record<1 | 2 | 3, number>> = { 1: 720, 2: 48, 3: 16 };
/** Asks one value of the parameter at a time; waves that were unstable before are tried first. */
export class WaveProbe {
  readonly scan: WaveGrid;
  private fine: WaveGrid | null = null;
  private readonly polynomial: ComplexArray;
  /** Waves that were unstable before are tried first: outside the bound they answer at once. */
  private suspects: number[][] = [];
  private conservativeValues = 0;

  /** @param valuesAt parameter values of the scheme at one position of the search */
  constructor(
    readonly scheme: NumericScheme,
    readonly scalar: ScalarScheme,
    private readonly isOver: () => boolean,
    private readonly valuesAt: (position: number) => readonly number[] = (p) => [p],
  ) {
    this.scan = waveGrid(scheme, SCAN_PER_PI[scheme.dims]);
    this.polynomial = complexArray(scheme.degree + 1);
  }

  get fineGrid(): WaveGrid {
    this.fine ??= waveGrid(this.scheme, FINE_PER_PI[this.scheme.dims]);
    return this.fine;
  }

  check(): void {
    if (this.isOver()) throw new SearchStopped();
  }

  excess(coefficients: ComplexArray, size: number, theta: readonly number[]): number {
    const polynomial = polynomialFrom(this.scheme, coefficients, theta);
    return excessOf(polynomial, polynomialRoots(polynomial), size);
  }

  isUnstableAt(parameter: number, theta: readonly number[]): boolean {
    const coefficients = coefficientsAt(this.scheme, this.valuesAt(parameter));
    return this.excess(coefficients, sizeOf(coefficients), theta) > 0;
  }

  /** An unstable wave of a grid, or null. */
  unstableWave(parameter: number, grid: WaveGrid, from = 0): { theta: number[]; index: number } | null {
    const coefficients = coefficientsAt(this.scheme, this.valuesAt(parameter));
    const size = sizeOf(coefficients);
    const { degree } = this.scheme;
    let warm: ComplexArray | undefined;
    for (let index = from; index < grid.count; index++) {
      if ((index & 1023) === 1023) this.check();
      grid.polynomial(index, coefficients, this.polynomial);
      let excess: number;
      if (degree === 1) excess = linearExcess(this.polynomial, size);
      else if (degree === 2 && isClearlyInside(this.polynomial)) continue;
      else {
        warm = polynomialRoots(this.polynomial, warm);
        excess = excessOf(this.polynomial, warm, size);
      }
      if (excess > 0) {
        const theta = grid.theta(index);
        this.suspects = [theta, ...this.suspects.slice(0, 5)];
        return { theta, index };
      }
    }
    return null;
  }

  /** "doubt": stable but for bands next to corner waves that only exact series can judge. */
  survey(parameter: number): 'stable' | 'unstable' | 'doubt' {
    this.check();
    if (this.suspects.some((theta) => this.isUnstableAt(parameter, theta))) return 'unstable';
    if (this.unstableWave(parameter, this.scan)) return 'unstable';
    if (this.isConservative(parameter)) return 'stable';
    const { kind } = lowWaveGrowth(this.scheme, null, this.valuesAt(parameter));
    return kind === 'none' ? 'stable' : 'doubt';
  }

  isStable(parameter: number): boolean {
    const first = this.survey(parameter);
    return first === 'doubt' ? this.lowGrowth(parameter) === null : first === 'stable';
  }

  /** Growth in a band next to a corner wave; not asked where every root of every wave keeps its modulus. */
  lowGrowth(parameter: number): LowWave | null {
    if (this.isConservative(parameter)) return null;
    const verdict = lowWaveGrowth(this.scheme, this.scalar, this.valuesAt(parameter));
    return verdict.kind === 'growing' ? verdict.wave : null;
  }

  /** A scheme that keeps all moduli at three values of the parameter does so wherever it is stable. */
  private isConservative(parameter: number): boolean {
    if (this.conservativeValues >= 3) return true;
    const isSo = this.keepsModuli(parameter);
    this.conservativeValues = isSo ? this.conservativeValues + 1 : -Infinity;
    return isSo;
  }

  private keepsModuli(parameter: number): boolean {
    if (this.conservativeValues === -Infinity) return false;
    const coefficients = coefficientsAt(this.scheme, this.valuesAt(parameter));
    const size = sizeOf(coefficients);
    for (let index = 0; index < this.scan.count; index++) {
      this.scan.polynomial(index, coefficients, this.polynomial);
      const roots = polynomialRoots(this.polynomial);
      for (let k = 0; k < roots.re.length; k++) {
        const deficit = 1 - Math.hypot(roots.re[k]!, roots.im[k]!);
        if (!(deficit <= 4 * rootTolerance(this.polynomial, roots.re[k]!, roots.im[k]!, size))) return false;
      }
    }
    return true;
  }
}

/** Thrown when the time is over or the work is cancelled. */
export class SearchStopped extends Error {}
