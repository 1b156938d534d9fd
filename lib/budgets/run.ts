/** A run in SI units and what it costs with one scheme: steps, memory, bytes, time, error. */
import { CONVENTIONS } from '@/lib/numerics/equation';
import type { NumericScheme } from '@/lib/numerics/numeric-scheme';
import type { SchemeFacts } from '@/lib/facts/facts';
import { fewestPoints } from '@/lib/shortlist/points-per-wave';
import { decays, DIRECTIONS, runErrorAlong } from '@/lib/shortlist/run-error';

const BYTES_A_VALUE = 8;

export interface Run {
  /** Extent of the grid along each dimension, m. */
  readonly extents: readonly number[];
  /** Speeds on the grid, m/s, fastest first; the equation's own coefficient (m²/s, …) where it has no speed. */
  readonly speeds: readonly [number, ...number[]];
  /** Shortest wave that matters, m. */
  readonly wavelength: number;
  /** Time to march, s. */
  readonly time: number;
  /** Smallest spacing over the spacing of the error, 0 … 1: a stretched grid steps by its smallest cell. */
  readonly smallest: number;
  /** A diffusion that shares the step: m²/s and the largest stable ν dt/dx²; null where there is none. */
  readonly diffusion: { readonly diffusivity: number; readonly bound: number } | null;
  /** Of one node: bytes a second, bytes. */
  readonly bandwidth: number;
  readonly memory: number;
  readonly nodes: number;
}

export interface Subject {
  readonly numeric: NumericScheme;
  readonly facts: SchemeFacts;
  /** Largest stable parameter; Infinity without end. */
  readonly bound: number;
}

export interface Tolerance {
  /** Degrees of phase, or part of the wave. */
  readonly kind: 'angle' | 'part';
  readonly value: number;
}

export interface RunCosting {
  readonly spacing: number;
  /** Of the fastest speed, at the spacing of the error. */
  readonly parameter: number;
  /** Time step, s. */
  readonly step: number;
  readonly steps: number;
  readonly points: number;
  readonly pointsPerWave: number;
  /** Bytes kept on all nodes, halos included. */
  readonly memory: number;
  /** Bytes moved in the whole run. */
  readonly bytes: number;
  readonly operations: number;
  /** Seconds at the bandwidth given; all nodes together. */
  readonly seconds: number;
  /** Error of the shortest wave at the end, worst speed: part of the wave, and degrees of phase. */
  readonly error: number;
  readonly drift: number;
  /** False where the step is past the bound. */
  readonly stable: boolean;
}

export interface TimeLimit {
  readonly name: string;
  /** Largest step that this limit allows, s. */
  readonly step: number;
}

const powerOf = (scheme: NumericScheme) =>
  CONVENTIONS[scheme.equation].spaceOrder / CONVENTIONS[scheme.equation].timeOrder;

/** dt of a parameter value on a spacing: lambda dx / c, r dx² / nu, mu dx³ / eps, q dx⁴ / kappa. */
export const stepOf = (parameter: number, spacing: number, speed: number, scheme: NumericScheme) =>
  (parameter * spacing ** powerOf(scheme)) / speed;
export const parameterOf = (step: number, spacing: number, speed: number, scheme: NumericScheme) =>
  (step * speed) / spacing ** powerOf(scheme);

/** Periods of the shortest wave (or its e-foldings) that the run lasts at one speed. */
export function durationOf(run: Pick<Run, 'wavelength' | 'time'>, speed: number, scheme: NumericScheme): number {
  const rate = speed * ((2 * Math.PI) / run.wavelength) ** powerOf(scheme);
  return decays(scheme.equation) ? run.time * rate : (run.time * rate) / (2 * Math.PI);
}

/** Points of the grid, and those kept when every node holds a block with its halos. */
export function keptPoints(run: Pick<Run, 'extents' | 'nodes'>, facts: SchemeFacts, spacing: number) {
  const dims = run.extents.length;
  const cells = run.extents.map((extent) => Math.max(1, Math.round(extent / spacing)));
  const perSide = Math.max(1, Math.round(run.nodes ** (1 / dims)));
  const kept = cells.reduce((product, n, k) => {
    const [left, right] = facts.halo[k] ?? facts.halo[0] ?? [0, 0];
    const split = k === dims - 1 ? Math.max(1, Math.round(run.nodes / perSide ** (dims - 1))) : perSide;
    return product * (n + split * (left + right));
  }, 1);
  return { points: cells.reduce((product, n) => product * n, 1), kept };
}

/**
 * The largest step of each limit at the wanted parameter: every speed on the smallest cell, and the diffusion.
 * @param parameter wanted for the fastest speed; the diffusion is kept as far below its own bound as this is below its
 */
export function timeLimits(run: Run, { numeric, bound }: Subject, spacing: number, parameter: number): TimeLimit[] {
  const cell = spacing * run.smallest;
  const part = Number.isFinite(bound) ? parameter / bound : 1;
  const speeds = run.speeds.map((speed) => ({
    name: run.speeds.length > 1 ? `the speed ${speed} m/s` : decays(numeric.equation) ? 'the equation' : 'the speed',
    step: stepOf(parameter, cell, speed, numeric),
  }));
  if (!run.diffusion) return speeds;
  return [
    ...speeds,
    { name: 'the diffusion', step: (part * run.diffusion.bound * cell ** 2) / run.diffusion.diffusivity },
  ];
}

/** Of several limits the smallest step rules. */
export const rulingLimit = (limits: readonly TimeLimit[]): TimeLimit | null =>
  limits.reduce<TimeLimit | null>((least, limit) => (least === null || limit.step < least.step ? limit : least), null);

/** Error and phase at the end of the run, the worst of the speeds and of the directions on the grid. */
export function errorOfRun(
  run: Run,
  { numeric }: Subject,
  spacing: number,
  step: number,
): { error: number; drift: number } {
  const points = run.wavelength / spacing;
  if (points < 2) return { error: Infinity, drift: Infinity };
  const errors = run.speeds.flatMap((speed) =>
    DIRECTIONS[CONVENTIONS[numeric.equation].dims].map((direction) =>
      runErrorAlong(
        numeric,
        parameterOf(step, spacing, speed, numeric),
        points,
        durationOf(run, speed, numeric),
        direction,
      ),
    ),
  );
  return {
    error: Math.max(...errors.map(({ total }) => total)),
    drift: Math.max(
      ...errors.map(({ phase, total }) => (Number.isFinite(total) ? (Math.abs(phase) * 180) / Math.PI : Infinity)),
    ),
  };
}

/** @param step s; it is taken as it is, stable or not */
export function costOfStep(run: Run, subject: Subject, spacing: number, step: number): RunCosting {
  const { numeric, facts, bound } = subject;
  const { points, kept } = keptPoints(run, facts, spacing);
  const steps = Math.ceil(run.time / step - 1e-9);
  const bytes = points * steps * facts.cost.bytesDouble;
  const cell = spacing * run.smallest;
  return {
    spacing,
    parameter: parameterOf(step, spacing, run.speeds[0], numeric),
    step,
    steps,
    points,
    pointsPerWave: run.wavelength / spacing,
    memory: kept * facts.storage.arraysInPlace * BYTES_A_VALUE,
    bytes,
    operations: points * steps * facts.cost.operations,
    seconds: bytes / (run.bandwidth * run.nodes),
    ...errorOfRun(run, subject, spacing, step),
    stable:
      parameterOf(step, cell, run.speeds[0], numeric) <= bound * (1 + 1e-9) &&
      (!run.diffusion || (step * run.diffusion.diffusivity) / cell ** 2 <= run.diffusion.bound * (1 + 1e-9)),
  };
}

/** The run at the step that all limits allow. */
export function costOfRun(run: Run, subject: Subject, spacing: number, parameter: number): RunCosting {
  return costOfStep(run, subject, spacing, rulingLimit(timeLimits(run, subject, spacing, parameter))!.step);
}

/** How far the costing is from the tolerance, 1 at it. */
export const shareOf = (costing: Pick<RunCosting, 'error' | 'drift'>, { kind, value }: Tolerance) =>
  (kind === 'angle' ? costing.drift : costing.error) / value;

/** The coarsest spacing that holds the tolerance at a parameter; null where none does. */
export function spacingFor(run: Run, subject: Subject, parameter: number, tolerance: Tolerance): number | null {
  const points = fewestPoints((n) => {
    const spacing = run.wavelength / n;
    const { step } = rulingLimit(timeLimits(run, subject, spacing, parameter))!;
    const found = errorOfRun(run, subject, spacing, step);
    // A phase turned right round is no small drift: the whole error must be that of an angle, too.
    const lost = tolerance.kind === 'angle' && found.error > 2;
    return !lost && shareOf(found, tolerance) <= 1;
  });
  return points === null ? null : run.wavelength / points;
}

export interface Rung {
  readonly factor: number;
  /** Parameter kept: the step shrinks with the spacing. */
  readonly scaled: RunCosting;
  /** Step kept: the parameter grows, and may pass the bound. */
  readonly stepKept: RunCosting;
}

/** The ladder: twice the spacing, as asked, half, a quarter. */
export function ladder(run: Run, subject: Subject, spacing: number, parameter: number): Rung[] {
  const { step } = costOfRun(run, subject, spacing, parameter);
  return [2, 1, 1 / 2, 1 / 4].map((factor) => ({
    factor,
    scaled: costOfRun(run, subject, spacing * factor, parameter),
    stepKept: costOfStep(run, subject, spacing * factor, step),
  }));
}

/** The smallest spacing whose arrays fit the memory of all nodes; null where not even one cell a side fits. */
export function finestSpacing(run: Run, facts: SchemeFacts): number | null {
  const available = run.memory * run.nodes;
  const needs = (spacing: number) => keptPoints(run, facts, spacing).kept * facts.storage.arraysInPlace * BYTES_A_VALUE;
  let coarse = Math.max(...run.extents);
  if (needs(coarse) > available) return null;
  let fine = coarse;
  while (needs(fine) <= available && fine > 1e-15) fine /= 2;
  for (let k = 0; k < 60; k++) {
    const middle = Math.sqrt(coarse * fine);
    if (needs(middle) <= available) coarse = middle;
    else fine = middle;
  }
  return coarse;
}
