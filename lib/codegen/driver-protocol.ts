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
 *                 status 3, outside the stable range, is told and the steps are taken all the same, by the step
 *                 routine that checks nothing: a trial marches just outside the bound to see that it grows there
 *
 *     start <id> <n> <parameter values>          the start-up routine (multi-level schemes only)
 *     <n lines: the initial level>               (second order in time: 2 n lines, u then dt·u_t)
 *       answers   state <id> <status> and the kept levels, oldest first
 *
 *     apply <id> <n> <h as bits>                 stencils
 *     <n lines: u>
 *       answers   state <id> <status> and n lines of the approximation
 *
 *     pace <id> <n> <repeats> <parameter values> best time of `repeats` runs, kernel and an own triad in one process
 *       answers   pace <id> <seconds per point and step> <triad bytes per second>     decimal
 *
 *     end
 */
export interface MarchTask {
  kind: 'march';
  id: string;
  n: number;
  steps: number;
  parameters: number[];
  levels: Float64Array[];
}
export interface StartTask {
  kind: 'start';
  id: string;
  n: number;
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
  n: number;
  repeats: number;
  parameters: number[];
}
export type DriverTask = MarchTask | StartTask | ApplyTask | PaceTask;

export type DriverAnswer =
  | { kind: 'state'; id: string; status: number; levels: Float64Array[] }
  | { kind: 'pace'; id: string; secondsPerPoint: number; triadBytesPerSecond: number };
