/**
 * How a trial talks to a compiled kernel.
 *
 * The generator prints, beside each kernel, a driver in the same language that calls the kernel's public
 * routines only. The driver reads tasks from a file whose name is its first argument and prints answers on
 * standard output. Doubles travel as the 16 hexadecimal digits of their bits, one a line, so that nothing is
 * lost between the languages.
 *
 *     march <id> <n> <steps> <parameter values as bits, one word each>
 *     <levels × n lines: the kept levels, oldest first, n interior points each>
 *       answers   state <id> <status>            status 0, or the kernel's error code
 *                 <kept levels × n lines, oldest first, after `steps` steps; none where status is not 0 or 3>
 *                 status 3, outside the stable range, is told and the steps are taken all the same: a trial
 *                 marches just outside the bound to see that it grows there
 *
 *     run <id> <n> <steps> <parameter values>    as march, but through the kernel's run routine with all its checks:
 *                                                no levels where status is not 0
 *
 *     start <id> <n> <parameter values>          the start-up routine (multi-level schemes only)
 *     <n lines: the initial level>               (second order in time: 2 n lines, u then dt·u_t)
 *       answers   state <id> <status> and the kept levels, oldest first
 *
 *     apply <id> <n> <h as bits>                 stencils
 *     <n lines: u>
 *       answers   state <id> <status> and n lines of the approximation
 *
 *     pace <id> <n> <repeats> <parameter values> best time of `repeats` runs, kernel and an own triad in one process;
 *                                                the triad counts 32 bytes a point: its store twice, as in the facts
 *       answers   pace <id> <seconds per point and step> <triad bytes per second>     decimal
 *
 *     end
 *
 * In two and three dimensions the word <n> is as many words as there are dimensions, the points along x, y, z; a level
 * has as many lines as the grid has points, x running fastest.
 *
 * Stencils on half-integer offsets: the approximation at i stands half a spacing to the right of u at i, so that
 * offset x reads u at i + x + 1/2 (offset 1/2 is the right neighbour). Periodic continuation everywhere.
 *
 * Time methods march n unknowns of a periodic test problem with dt = 1: one parameter lambda,
 * u' = -lambda (u_(i+1) - u_(i-1)) / 2; two parameters lambda and r add r (u_(i+1) - 2 u_i + u_(i-1)).
 * Their kept levels are the k levels of a k-step method, one for Runge-Kutta.
 *
 * Malformed tasks end the driver with exit status 1 or 2 and a sentence on standard error.
 */
export interface MarchTask {
  kind: 'march';
  id: string;
  /** Points in all. */
  n: number;
  /** Points along x, y, z in two and three dimensions; their product is n. */
  grid?: readonly number[] | undefined;
  steps: number;
  parameters: number[];
  levels: Float64Array[];
}
export interface RunTask {
  kind: 'run';
  id: string;
  /** Points in all. */
  n: number;
  /** Points along x, y, z in two and three dimensions; their product is n. */
  grid?: readonly number[] | undefined;
  steps: number;
  parameters: number[];
  levels: Float64Array[];
}
export interface StartTask {
  kind: 'start';
  id: string;
  /** Points in all. */
  n: number;
  /** Points along x, y, z in two and three dimensions; their product is n. */
  grid?: readonly number[] | undefined;
  parameters: number[];
  levels: Float64Array[];
}
export interface ApplyTask {
  kind: 'apply';
  id: string;
  n: number;
  spacing: number;
  values: Float64Array;
}
export interface PaceTask {
  kind: 'pace';
  id: string;
  /** Points in all. */
  n: number;
  /** Points along x, y, z in two and three dimensions; their product is n. */
  grid?: readonly number[] | undefined;
  repeats: number;
  parameters: number[];
}
export type DriverTask = MarchTask | RunTask | StartTask | ApplyTask | PaceTask;

export type DriverAnswer =
  | { kind: 'state'; id: string; status: number; levels: Float64Array[] }
  | { kind: 'pace'; id: string; secondsPerPoint: number; triadBytesPerSecond: number };
