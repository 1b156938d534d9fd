/** Starts a part again when it ends by itself, each time after a longer pause, and gives up in the end. */
import { sleep } from './processes.mjs';
import { say, seconds } from './say.mjs';

const PAUSES_MS = [200, 1_000, 2_000, 4_000, 8_000, 15_000];
/** A part that ran this long is not in a circle of quick deaths. */
const STEADY_MS = 60_000;

/**
 * @param name   for the messages
 * @param start  (attempt) → Promise of `{ pid, ended: Promise<string>, stop(): Promise<void> }`; it may
 *   throw, which counts as a quick death
 * @returns {Promise<{part: () => object | null, gaveUp: Promise<string>, stop: () => Promise<void>}>} after the
 *   first start, whose failure is thrown; `gaveUp` resolves with a sentence once no further start is tried
 */
export async function keepRunning({ name, start }) {
  let part = await start(0);
  let stopping = false;

  const watch = async () => {
    let quickDeaths = 0;
    for (;;) {
      const since = Date.now();
      let how;
      if (part) {
        how = await part.ended;
        if (Date.now() - since > STEADY_MS) quickDeaths = 0;
      } else how = 'it did not come up';
      if (stopping) return new Promise(() => {});
      if (quickDeaths >= PAUSES_MS.length) {
        return `The ${name} ended ${quickDeaths + 1} times in a row (last: ${how}); giving up.`;
      }
      const pause = PAUSES_MS[quickDeaths];
      quickDeaths += 1;
      say(`  the ${name} ended (${how}); starting it again in ${seconds(pause)}`);
      part = null;
      await sleep(pause);
      if (stopping) return new Promise(() => {});
      try {
        part = await start(quickDeaths);
        if (stopping) await part.stop();
        else say(`  the ${name} runs again (process ${part.pid})`);
      } catch (error) {
        say(`  the ${name} did not start: ${error.message}`);
      }
    }
  };

  return {
    part: () => part,
    gaveUp: watch(),
    stop: async () => {
      stopping = true;
      await part?.stop();
    },
  };
}
