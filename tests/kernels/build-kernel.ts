/** Compiles a generated kernel with its driver in a temporary folder and gives it tasks. */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { BUILD_FLAGS } from '@/lib/codegen/compile-flags';
import type { DriverAnswer, DriverTask } from '@/lib/codegen/driver-protocol';
import { formatTasks, parseAnswers } from '@/lib/codegen/driver-text';
import { generateDriver } from '@/lib/codegen/generate-driver';
import { generateKernel } from '@/lib/codegen/generate-kernel';
import type { KernelInput, KernelLanguage, KernelOptions } from '@/lib/codegen/kernel-request';

export const PERIODIC: KernelOptions = { precision: 'double', boundary: 'periodic' };
export const CALLER: KernelOptions = { precision: 'double', boundary: 'caller' };
const PYTHON = '/usr/bin/python3';

export class BuiltKernel {
  constructor(
    readonly folder: string,
    private readonly command: readonly string[],
  ) {}

  /** Exit status and streams of the driver on a task text. */
  runText(tasks: string) {
    writeFileSync(path.join(this.folder, 'tasks'), tasks);
    const [program, ...rest] = this.command;
    return spawnSync(program!, [...rest, 'tasks'], { cwd: this.folder, encoding: 'utf8', maxBuffer: 1 << 28 });
  }

  /** @throws {Error} where the driver does not end with status 0 */
  run(tasks: readonly DriverTask[]): DriverAnswer[] {
    const { status, stdout, stderr } = this.runText(formatTasks(tasks));
    if (status !== 0) throw new Error(`driver: exit status ${status}: ${stderr}`);
    return parseAnswers(stdout, (id) => tasks.find((t) => t.id === id)?.n);
  }

  /** Levels of a single task that succeeds. */
  levels(task: DriverTask): Float64Array[] {
    const [answer] = this.run([task]);
    if (answer?.kind !== 'state' || answer.status !== 0) throw new Error(`driver: ${JSON.stringify(answer)}`);
    return answer.levels;
  }

  remove() {
    rmSync(this.folder, { recursive: true, force: true });
  }
}

/** callgrind knows AVX2 but not AVX-512, so that instructions are counted for the portable level below it. */
const countable = (flags: readonly string[]) =>
  flags.map((flag) => (flag === '-march=native' ? '-march=x86-64-v3' : flag));

/** @throws {Error} with the compiler's messages where it says anything at all */
export function buildKernel(
  input: KernelInput,
  language: KernelLanguage,
  options: KernelOptions = PERIODIC,
  build: 'release' | 'checked' | 'countable' = 'release',
): BuiltKernel {
  const answer = generateKernel(input, language, options);
  if (answer.kind === 'none') throw new Error(answer.reason);
  const driver = generateDriver(input, language, options);
  const folder = mkdtempSync(path.join(tmpdir(), 'levelbook-kernel-'));
  writeFileSync(path.join(folder, answer.kernel.fileName), answer.kernel.source);
  writeFileSync(path.join(folder, driver.fileName), driver.source);
  const flags = BUILD_FLAGS[language];
  if (language === 'python') return new BuiltKernel(folder, [PYTHON, ...flags.warnings, driver.fileName]);
  const { status, stderr, error } = spawnSync(
    flags.compiler,
    [
      ...(build === 'countable' ? countable(flags.release) : flags[build]),
      ...flags.warnings,
      answer.kernel.fileName,
      driver.fileName,
      '-o',
      'driver',
      ...flags.libraries,
    ],
    { cwd: folder, encoding: 'utf8' },
  );
  if (error) throw error;
  if (status !== 0 || stderr !== '') throw new Error(`${input.callNumber}, ${language}: ${stderr}`);
  return new BuiltKernel(folder, [path.join(folder, 'driver')]);
}

/** n values within −1 … 1 from a linear congruence: the same in every run. */
export function randomField(n: number, seed: number): Float64Array {
  let state = BigInt(seed) * 2_862_933_555_777_941_757n + 3_037_000_493n;
  return Float64Array.from({ length: n }, () => {
    state = BigInt.asUintN(64, state * 6_364_136_223_846_793_005n + 1_442_695_040_888_963_407n);
    return Number(state >> 11n) / 2 ** 52 - 1;
  });
}
