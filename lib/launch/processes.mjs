/** Questions to the system's process table. */
import fs from 'node:fs';

export const sleep = (ms) => new Promise((resolve) => setTimeout(resolve, ms));

/**
 * Name, parent and start time of a living process, or null.
 * A zombie counts as dead: it still answers `kill(pid, 0)`, but holds nothing any more.
 * The start time (clock ticks since boot) tells a process from a later one with the same number.
 */
export function livingProcess(pid) {
  try {
    const stat = fs.readFileSync(`/proc/${pid}/stat`, 'utf8');
    const afterName = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    if (afterName[0] === 'Z' || afterName[0] === 'X') return null;
    const name = stat.slice(stat.indexOf('(') + 1, stat.lastIndexOf(')'));
    return { name, parent: Number(afterName[1]), startTime: Number(afterName[19]) };
  } catch {
    return null;
  }
}

/** Waits until `isDone` says so; false when the time ran out first. */
export async function until(isDone, limitMs, pauseMs = 50) {
  for (const end = Date.now() + limitMs; Date.now() < end; await sleep(pauseMs)) if (await isDone()) return true;
  return Boolean(await isDone());
}
