import 'server-only';
import { eventHub } from './event-hub';

const KEEP_ALIVE_MS = 15_000;
/** How soon a browser tries again where the line was cut. */
const RETRY_MS = 2_000;
/** The database may be away for a moment; the state is then read again. */
const READ_AGAIN_MS = 2_000;

/**
 * A stream of server-sent events that carries the state of one trial each time there is news of it.
 * @param read   the state as it is now; null where there is none any more, which ends the stream
 * @param isLast whether nothing can follow this state; the stream then ends
 */
export function eventStream<State>(
  trialId: string,
  read: () => Promise<State | null>,
  isLast: (state: State) => boolean,
  signal: AbortSignal,
): Response {
  const encoder = new TextEncoder();
  let close = () => {};
  const body = new ReadableStream<Uint8Array>({
    start(controller) {
      let open = true;
      let sent = '';
      const cleanUps: (() => void)[] = [];
      const write = (text: string) => {
        if (open) controller.enqueue(encoder.encode(text));
      };
      close = () => {
        if (!open) return;
        open = false;
        cleanUps.forEach((cleanUp) => cleanUp());
        try {
          controller.close();
        } catch {
          // The browser went first.
        }
      };
      // News that arrives while a state is read asks for one more reading after it.
      let reading = false;
      let again = false;
      const tell = async () => {
        if (reading) {
          again = true;
          return;
        }
        reading = true;
        try {
          do {
            again = false;
            const state = await read();
            if (!open) return;
            if (state === null) return close();
            const text = JSON.stringify(state);
            if (text !== sent) write(`data: ${text}\n\n`);
            sent = text;
            if (isLast(state)) return close();
          } while (again && open);
        } catch {
          const timer = setTimeout(() => void tell(), READ_AGAIN_MS);
          cleanUps.push(() => clearTimeout(timer));
        } finally {
          reading = false;
        }
      };
      const hub = eventHub();
      const beat = setInterval(() => write(': still here\n\n'), KEEP_ALIVE_MS);
      cleanUps.push(
        hub.subscribe(trialId, () => void tell()),
        hub.keep(close),
        () => clearInterval(beat),
      );
      signal.addEventListener('abort', close, { once: true });
      write(`retry: ${RETRY_MS}\n\n`);
      // Subscribed first, read then: nothing falls between the two.
      void tell();
    },
    cancel: () => close(),
  });
  return new Response(body, {
    headers: {
      'Content-Type': 'text/event-stream; charset=utf-8',
      'Cache-Control': 'no-cache, no-transform',
      'X-Accel-Buffering': 'no',
    },
  });
}
