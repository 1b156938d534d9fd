import { afterEach, beforeEach, expect, it, vi } from 'vitest';
import { keepRunning } from '@/lib/launch/keep-running.mjs';

beforeEach(() => {
  vi.useFakeTimers();
  vi.spyOn(process.stdout, 'write').mockReturnValue(true);
});
afterEach(() => {
  vi.useRealTimers();
  vi.restoreAllMocks();
});

/** A part whose starts are counted and whose end the test decides. */
function aPart() {
  const ends: ((how: string) => void)[] = [];
  const stop = vi.fn(async () => {});
  const start = async () => {
    const ended = new Promise<string>((resolve) => ends.push(resolve));
    return { pid: ends.length, ended, stop };
  };
  const end = async (waitMs: number) => {
    ends.at(-1)?.('signal SIGKILL');
    await vi.advanceTimersByTimeAsync(waitMs);
  };
  return { start, stop, end, starts: () => ends.length };
}

it('starts a part again after it ended, with a longer pause each time', async () => {
  const part = aPart();
  await keepRunning({ name: 'worker', start: part.start });
  await part.end(150);
  expect(part.starts()).toBe(1);
  await vi.advanceTimersByTimeAsync(100);
  expect(part.starts()).toBe(2);
  await part.end(900);
  expect(part.starts()).toBe(2);
  await vi.advanceTimersByTimeAsync(200);
  expect(part.starts()).toBe(3);
});

it('gives up with a sentence after seven quick deaths in a row', async () => {
  const part = aPart();
  const { gaveUp } = await keepRunning({ name: 'worker', start: part.start });
  const sentence = vi.fn();
  void gaveUp.then(sentence);
  for (let death = 1; death <= 7; death += 1) {
    expect(sentence).not.toHaveBeenCalled();
    await part.end(20_000);
  }
  expect(sentence).toHaveBeenCalledWith('The worker ended 7 times in a row (last: signal SIGKILL); giving up.');
  expect(part.starts()).toBe(7);
});

it('forgets earlier deaths once a part ran for a minute', async () => {
  const part = aPart();
  await keepRunning({ name: 'worker', start: part.start });
  for (let death = 1; death <= 20; death += 1) {
    await vi.advanceTimersByTimeAsync(61_000);
    await part.end(1_000);
  }
  expect(part.starts()).toBe(21);
});

it('does not start again what it was asked to stop', async () => {
  const part = aPart();
  const kept = await keepRunning({ name: 'worker', start: part.start });
  await kept.stop();
  await part.end(60_000);
  expect(part.stop).toHaveBeenCalledTimes(1);
  expect(part.starts()).toBe(1);
});

it('throws when the first start fails', async () => {
  const start = async () => {
    throw new Error('no such file');
  };
  await expect(keepRunning({ name: 'worker', start })).rejects.toThrow('no such file');
});
