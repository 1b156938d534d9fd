import { expect, it } from 'vitest';
import { INSTRUCTION_GOALS, instructionsPerPoint } from './count-instructions';

it.each(INSTRUCTION_GOALS)(
  'the C kernel of %s takes few instructions a point and step',
  (name, parameter, levels, goal) => {
    const counted = instructionsPerPoint(name, parameter, levels);
    expect(counted).toBeGreaterThan(0.5);
    expect(counted).toBeLessThanOrEqual(goal);
  },
);
