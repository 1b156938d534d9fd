/** Speed of the kernel against what the memory of the same machine gave in the same run. */
import { outcomeOf, short, NoAnswer, type Check } from './check';
import { gridText, sized } from './grid';
import type { Subject } from './subject';

/** Held by the second-level cache of common processors, and long enough that a call costs nothing beside it. */
const POINTS = 20_000;
/** The same number of points in every dimension. */
const GRIDS: Readonly<Record<1 | 2 | 3, readonly number[]>> = { 1: [POINTS], 2: [160, 125], 3: [32, 25, 25] };
const REPEATS = 5;
const ID = 'pace:0';

export function paceCheck(subject: Subject): Check {
  const parameters = subject.kind === 'march' ? [...subject.working[0]!] : [];
  const withRightHandSide = subject.kind === 'march' && subject.refine === 'time';
  const grid = GRIDS[subject.kind === 'march' ? subject.scheme.dims : 1];
  return {
    name: 'pace',
    tasks: [{ kind: 'pace', id: ID, ...sized(grid), repeats: REPEATS, parameters }],
    judge: (answers) => {
      const answer = answers.get(ID);
      if (answer?.kind !== 'pace') throw new NoAnswer('the kernel gave no time');
      const { secondsPerPoint, triadBytesPerSecond } = answer;
      const pointsPerSecond = 1 / secondsPerPoint;
      const fraction = (pointsPerSecond * subject.bytes) / triadBytesPerSecond;
      return {
        // A reading, not a judgement: a shared machine must not fail a kernel.
        outcome: outcomeOf(Number.isFinite(pointsPerSecond) && pointsPerSecond > 0),
        measured: `${short(pointsPerSecond / 1e6)} Mpoints/s, ${short(fraction)} of the triad`,
        target: 'reported',
        how: `${withRightHandSide ? 'Together with the right-hand side of the test problem: best' : 'Best'} of ${REPEATS} runs on ${gridText(grid)} points, as a part of what an own triad (a = b + s c) moved in the same process, at ${subject.bytes} bytes a point; a reading of this machine under its load at that time, which no kernel fails by.`,
        data: { pointsPerSecond, triadBytesPerSecond, fraction, points: POINTS },
      };
    },
  };
}
