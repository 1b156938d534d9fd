/** What the launcher tells: plain lines, and how long each step took. */

// A terminal that is closed under us must not turn an orderly stop into a crash.
process.stdout.on('error', () => {});
process.stderr.on('error', () => {});

export function say(line) {
  process.stdout.write(`${line}\n`);
}

export const seconds = (ms) => `${(ms / 1000).toFixed(1)} s`;

/** Runs one step and tells its time; the step may return a few words on what it found. */
export async function step(title, work) {
  const start = Date.now();
  const result = await work();
  const remark = typeof result === 'string' ? `: ${result}` : '';
  say(`  ${title}${remark} (${seconds(Date.now() - start)})`);
  return result;
}
