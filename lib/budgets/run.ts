/** A run as the budget takes it, in SI units, and what it costs: steps, memory, bytes, time, error. */
import { z } from 'zod';
import { CONVENTIONS } from '@/lib/numerics/equation';
import type { NumericScheme } from '@/lib/numerics/numeric-scheme';
import type { SchemeFacts } from '@/lib/facts/facts';
import { decays, runError } from '@/lib/shortlist/run-error';

const positive = (low: number, high: number, sentence: string) =>
  z.coerce
    .number({ error: sentence })
    .refine((value) => Number.isFinite(value) && value >= low && value <= high, sentence);

export const Run = z.object({
  /** Extent of the grid along each dimension, m; unused dimensions are ignored. */
  length: positive(1e-9, 1e9, 'Accepted: a length between 1 nm and 1 000 000 km, in metres.').default(6000),
  width: positive(1e-9, 1e9, 'Accepted: a width between 1 nm and 1 000 000 km, in metres.').default(1200),
  height: positive(1e-9, 1e9, 'Accepted: a height between 1 nm and 1 000 000 km, in metres.').default(600),
  /** Fastest speed, m/s; for diffusion the diffusivity, m²/s. */
  speed: positive(
    1e-12,
    3e8,
    'Accepted: a speed between 1e-12 and 3e8 m/s (for diffusion a diffusivity in m²/s).',
  ).default(1500),
  /** Shortest wave that matters, m. */
  wavelength: positive(1e-9, 1e9, 'Accepted: a wavelength between 1 nm and 1 000 000 km, in metres.').default(15),
  /** Time to march, s. */
  time: positive(1e-12, 1e11, 'Accepted: a time between 1e-12 s and about 3000 years, in seconds.').default(4.4),
  /** Spacing, m, equal in all dimensions. */
  spacing: positive(1e-12, 1e9, 'Accepted: a spacing between 1e-12 and 1e9 m.').default(1),
  /** Part of the stable bound at which to march. */
  part: positive(0.001, 1, 'Accepted: a part of the bound between 0.001 and 1.').default(0.9),
  /** Memory bandwidth of one node, bytes/s, and its memory, bytes. */
  bandwidth: positive(1e6, 1e15, 'Accepted: a bandwidth between 1 MB/s and 1 PB/s, in bytes a second.').default(1.8e11),
  memory: positive(1e3, 1e18, 'Accepted: a memory between 1 kB and 1 EB, in bytes.').default(9.6e10),
  processes: positive(1, 1e6, 'Accepted: 1 to 1 000 000 processes.').default(1),
});
export type Run = z.infer<typeof Run>;

export interface RunCosting {
  readonly spacing: number;
  readonly parameter: number;
  /** Time step, s. */
  readonly step: number;
  readonly steps: number;
  readonly points: number;
  readonly pointsPerWave: number;
  /** Bytes kept, halos included. */
  readonly memory: number;
  /** Bytes moved in the whole run. */
  readonly bytes: number;
  readonly operations: number;
  /** Seconds at the bandwidth given; all processes together. */
  readonly seconds: number;
  /** Error at the end of the run, of the shortest wave, part of its amplitude; and its phase, radians. */
  readonly error: number;
  readonly phase: number;
  /** False where the parameter is past the bound. */
  readonly stable: boolean;
}

const extents = ({ length, width, height }: Run, dims: number) => [length, width, height].slice(0, dims);

/** Cells along one side of a process, and those kept for its halo. */
function keptCells(run: Run, facts: SchemeFacts, spacing: number, dims: number): { points: number; kept: number } {
  const cells = extents(run, dims).map((extent) => Math.max(1, Math.round(extent / spacing)));
  const points = cells.reduce((product, n) => product * n, 1);
  const perSide = Math.round(run.processes ** (1 / dims));
  const kept = cells.reduce((product, n, k) => {
    const [left, right] = facts.halo[k] ?? facts.halo[0] ?? [0, 0];
    const split = Math.max(1, k === dims - 1 ? Math.round(run.processes / perSide ** (dims - 1)) : perSide);
    return product * (n + split * (left + right));
  }, 1);
  return { points, kept };
}

/** dt of a parameter value on a spacing: lambda dx / c, r dx² / nu, mu dx³ / eps, q dx⁴ / kappa. */
export const stepOf = (parameter: number, spacing: number, speed: number, scheme: NumericScheme) =>
  (parameter * spacing ** (CONVENTIONS[scheme.equation].spaceOrder / CONVENTIONS[scheme.equation].timeOrder)) / speed;
export const parameterOf = (step: number, spacing: number, speed: number, scheme: NumericScheme) =>
  (step * speed) / spacing ** (CONVENTIONS[scheme.equation].spaceOrder / CONVENTIONS[scheme.equation].timeOrder);

/** Periods of the shortest wave (or its e-foldings) that the run lasts. */
export function durationOf(run: Run, scheme: NumericScheme): number {
  const { spaceOrder, timeOrder } = CONVENTIONS[scheme.equation];
  const power = spaceOrder / timeOrder;
  const rate = run.speed * ((2 * Math.PI) / run.wavelength) ** power;
  return decays(scheme.equation) ? run.time * rate : (run.time * rate) / (2 * Math.PI);
}

/**
 * @param parameter CFL number (or diffusion number) at which to march, > 0
 * @param bound     largest stable value; Infinity without end
 */
export function costOfRun(
  run: Run,
  scheme: NumericScheme,
  facts: SchemeFacts,
  spacing: number,
  parameter: number,
  bound: number,
): RunCosting {
  const { dims } = CONVENTIONS[scheme.equation];
  const { points, kept } = keptCells(run, facts, spacing, dims);
  const step = stepOf(parameter, spacing, run.speed, scheme);
  const steps = Math.ceil(run.time / step - 1e-9);
  const bytes = points * steps * facts.cost.bytesDouble;
  const pointsPerWave = run.wavelength / spacing;
  const error = pointsPerWave < 2 ? null : runError(scheme, parameter, pointsPerWave, durationOf(run, scheme));
  return {
    spacing,
    parameter,
    step,
    steps,
    points,
    pointsPerWave,
    memory: kept * facts.storage.arraysInPlace * 8,
    bytes,
    operations: points * steps * facts.cost.operations,
    seconds: bytes / (run.bandwidth * run.processes),
    error: error?.total ?? Infinity,
    phase: error?.phase ?? Infinity,
    stable: parameter <= bound * (1 + 1e-12),
  };
}

export interface Rung {
  readonly factor: number;
  /** Parameter kept: the step shrinks with the spacing. */
  readonly scaled: RunCosting;
  /** Step kept: the parameter grows, and may pass the bound. */
  readonly stepKept: RunCosting;
}

/** The ladder: twice the spacing, as asked, half, a quarter. */
export function ladder(run: Run, scheme: NumericScheme, facts: SchemeFacts, parameter: number, bound: number): Rung[] {
  const asked = stepOf(parameter, run.spacing, run.speed, scheme);
  return [2, 1, 1 / 2, 1 / 4].map((factor) => {
    const spacing = run.spacing * factor;
    return {
      factor,
      scaled: costOfRun(run, scheme, facts, spacing, parameter, bound),
      stepKept: costOfRun(run, scheme, facts, spacing, parameterOf(asked, spacing, run.speed, scheme), bound),
    };
  });
}

/** The smallest spacing whose arrays fit the memory of all processes; null where not even one cell a side fits. */
export function finestSpacing(run: Run, scheme: NumericScheme, facts: SchemeFacts): number | null {
  const { dims } = CONVENTIONS[scheme.equation];
  const available = run.memory * run.processes;
  const needs = (spacing: number) => keptCells(run, facts, spacing, dims).kept * facts.storage.arraysInPlace * 8;
  let coarse = Math.max(...extents(run, dims));
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

export interface TimeLimit {
  readonly name: string;
  /** Largest step that this limit allows, s. */
  readonly step: number;
}

/** Of several limits (advection and diffusion, several speeds, a smallest spacing) the smallest step rules. */
export function rulingLimit(limits: readonly TimeLimit[]): TimeLimit | null {
  return limits.reduce<TimeLimit | null>(
    (least, limit) => (least === null || limit.step < least.step ? limit : least),
    null,
  );
}
