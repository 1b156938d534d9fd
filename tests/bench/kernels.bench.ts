/**
 * Generated kernels as ratios measured in one run: against textbook forms and an own triad, Fortran against C, NumPy
 * against np.roll and C. Ratios are to be read; absolute figures depend on the machine and its load.
 */
import { buildKernel } from '../kernels/build-kernel';
import { INSTRUCTION_GOALS, instructionsPerPoint } from '../kernels/count-instructions';
import { kernelInput, type KernelCase } from '../kernels/kernel-cases';
import { raceInC, raceInPython } from './kernel-race';

const KERNELS: [KernelCase, number][] = [
  ['leapfrog2', 0.7],
  ['leapfrog4', 0.45],
  ['laxWendroff', 0.8],
  ['heat', 0.4],
  ['wave', 0.9],
  ['rk4c4', 1.3],
];
/** 8-byte points: some kilobytes, then a few hundred, then megabytes, then far beyond every cache. */
const SIZES = [
  [640, 'L1'],
  [12_288, 'L2'],
  [200_000, 'L3'],
  [4_000_000, 'DRAM'],
] as const;
const TRIAD_BYTES = 32;
/** One array in, another out; where the oldest level is overwritten in place, loads wait for the stores before them. */
const TWO_ARRAYS: KernelCase[] = ['laxWendroff', 'heat'];

const rows: string[][] = [['kernel', 'where', 'what', 'measured', 'goal', 'reached']];
interface Goal {
  readonly value: number;
  readonly atMost?: boolean;
}
/** @param goal null: shown for comparison only */
function report(kernel: string, where: string, what: string, value: number, goal: Goal | null): void {
  const reached = goal && (goal.atMost ? value <= goal.value : value >= goal.value);
  rows.push([
    kernel,
    where,
    what,
    value.toFixed(2),
    goal ? `${goal.atMost ? '<=' : '>='} ${goal.value.toFixed(2)}` : '-',
    goal ? (reached ? 'yes' : 'no') : '-',
  ]);
}
const atLeast = (value: number): Goal => ({ value });

function bytesOf(name: KernelCase): number {
  const { facts } = kernelInput(name);
  return facts.kind === 'scheme' ? facts.cost.bytesDouble : 0;
}

/** Best seconds a point and step by the driver's own clock, the two languages in turn. */
function compareLanguages(name: KernelCase, parameter: number): Map<number, { c: number; fortran: number }> {
  const built = { c: buildKernel(kernelInput(name), 'c'), fortran: buildKernel(kernelInput(name), 'fortran') };
  const best = new Map<number, { c: number; fortran: number }>();
  for (let round = 0; round < 3; round++)
    for (const language of ['c', 'fortran'] as const)
      for (const [n] of SIZES) {
        const [answer] = built[language].run([{ kind: 'pace', id: 'p', n, repeats: 3, parameters: [parameter] }]);
        if (answer?.kind !== 'pace') throw new Error(`${name}: the driver did not answer pace`);
        const entry = best.get(n) ?? { c: Infinity, fortran: Infinity };
        entry[language] = Math.min(entry[language], answer.secondsPerPoint);
        best.set(n, entry);
      }
  built.c.remove();
  built.fortran.remove();
  return best;
}

for (const [name, parameter] of KERNELS) {
  const sizes = SIZES.map(([n]) => n);
  const inC = raceInC(name, parameter, sizes);
  const languages = compareLanguages(name, parameter);
  const inPython = raceInPython(name, parameter, sizes);
  SIZES.forEach(([n, where], k) => {
    const { kernel, textbook, triad } = inC[k]!;
    const dram = where === 'DRAM';
    report(name, where, 'C, times the textbook form', textbook / kernel, atLeast(dram ? 5 : 15));
    // Stages are several sweeps a step, bound by arithmetic in the caches; they are not held to the triad.
    if (name !== 'rk4c4' && dram)
      report(
        name,
        where,
        "C, share of the triad's bytes",
        bytesOf(name) / kernel / (TRIAD_BYTES / triad),
        atLeast(0.75),
      );
    if (name !== 'rk4c4' && where === 'L2')
      report(
        name,
        where,
        "C, share of the triad's points",
        triad / kernel,
        TWO_ARRAYS.includes(name) ? atLeast(0.9) : null,
      );
    const pair = languages.get(n)!;
    report(name, where, 'Fortran, times C', pair.c / pair.fortran, atLeast(0.9));
    report(name, where, 'NumPy, times np.roll', inPython[k]!.textbook / inPython[k]!.kernel, atLeast(2.5));
    if (n >= 16_000) report(name, where, 'NumPy, times C', kernel / inPython[k]!.kernel, atLeast(1 / 6));
  });
}
for (const [name, parameter, levels, goal] of INSTRUCTION_GOALS)
  report(name, '-', 'C, instructions a point', instructionsPerPoint(name, parameter, levels), {
    value: goal,
    atMost: true,
  });

const widths = rows[0]!.map((_, k) => Math.max(...rows.map((row) => row[k]!.length)));
process.stdout.write(
  `${rows
    .map((row) =>
      row
        .map((cell, k) => cell.padEnd(widths[k]!))
        .join('  ')
        .trimEnd(),
    )
    .join('\n')}\n`,
);
