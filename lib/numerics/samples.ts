/** Amplification factors, phase and decay at chosen waves and parameter values, from exact texts. */
import { amplificationFactors, largestModulus } from './amplification';
import type { CanonicalScheme } from './canonical-scheme';
import { schemeCurves } from './curves';
import { compileScheme } from './numeric-scheme';
import { trackPrincipalRoot } from './principal-root';
import { parseRational, toNumber } from './rational';
import { systemEigenvalues } from './system-matrix';

export interface SampleRequest {
  /** Exact values by name; a common symbol stands for all directions. */
  readonly parameters: Readonly<Record<string, string>>;
  /** One angle per dimension: "1/4*pi", "pi", "0" or a plain number in radians. */
  readonly theta: readonly string[];
}

export interface RootSample {
  parameters: Record<string, string>;
  theta: string[];
  /** [re, im], ascending modulus, then argument; as many as roots per wave. */
  roots: [number, number][];
  maxModulus: number;
  /** null for systems, where it vanishes, and where it has collided with a computational root. */
  principalRoot: [number, number] | null;
  relativePhaseSpeed: number | null;
  relativeDecayRate: number | null;
}

/** @throws {RangeError} naming the text, where it is neither a rational number nor a rational multiple of pi */
export function parseAngle(text: string): number {
  const match = /^\s*([+-]?[^*]*?)\s*\*?\s*(pi)?\s*$/.exec(text);
  const factor = match?.[1] ?? '';
  if (match?.[2] === 'pi') {
    const multiple = factor === '' || factor === '+' ? 1 : factor === '-' ? -1 : toNumber(parseRational(factor));
    return multiple * Math.PI;
  }
  const over = /^\s*([+-]?\d*)\*?pi\/(\d+)\s*$/.exec(text);
  if (over) return ((over[1] === '' ? 1 : over[1] === '-' ? -1 : Number(over[1])) * Math.PI) / Number(over[2]);
  try {
    return toNumber(parseRational(text));
  } catch {
    throw new RangeError(
      `parseAngle: '${text}' is not an angle; accepted: a number or a multiple of pi such as 1/4*pi`,
    );
  }
}

/** @throws {RangeError} naming the parameter that has no value */
function valuesOf(names: readonly string[], given: Readonly<Record<string, string>>): number[] {
  return names.map((name) => {
    const text = given[name] ?? given[name.replace(/_[xyz]$/, '')] ?? given[`${name}_x`];
    if (text === undefined) throw new RangeError(`sampleRoots: no value is given for the parameter ${name}`);
    return toNumber(parseRational(text));
  });
}

/** @throws {RangeError} if a parameter is missing, a text is not a number, or theta has the wrong number of components */
export function sampleRoots(scheme: CanonicalScheme, at: readonly SampleRequest[]): RootSample[] {
  const numeric = compileScheme(scheme);
  return at.map((request) => {
    const values = valuesOf(scheme.parameters, request.parameters);
    const theta = request.theta.map(parseAngle);
    if (theta.length !== scheme.dims)
      throw new RangeError(
        `sampleRoots: theta has ${theta.length} components, the scheme has ${scheme.dims} dimensions`,
      );
    const factors =
      (scheme.form === 'system'
        ? systemEigenvalues(scheme, values, theta, numeric.degree + numeric.stationaryRoots)
        : null) ?? amplificationFactors(numeric, values, theta);
    const roots = Array.from(factors.re, (re, k): [number, number] => [re, factors.im[k]!]).sort(
      (a, b) => Math.hypot(...a) - Math.hypot(...b) || Math.atan2(a[1], a[0]) - Math.atan2(b[1], b[0]),
    );
    const sample: RootSample = {
      parameters: { ...request.parameters },
      theta: [...request.theta],
      roots,
      maxModulus: largestModulus(factors),
      principalRoot: null,
      relativePhaseSpeed: null,
      relativeDecayRate: null,
    };
    if (scheme.form === 'system') return sample;
    const [tracked] = trackPrincipalRoot(numeric, values, theta, [1]);
    const [curve] = schemeCurves(numeric, values, theta, [1]);
    if (!tracked || !curve || tracked.index < 0 || curve.modulus === 0) return sample;
    return {
      ...sample,
      principalRoot: [tracked.re, tracked.im],
      relativePhaseSpeed: curve.phaseSpeed,
      relativeDecayRate: curve.decayRate,
    };
  });
}
