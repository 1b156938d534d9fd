import 'server-only';
import { listen, type Listening } from '@/db/listen';
import { TRIAL_PROGRESS } from '@/db/queries/trials';

/**
 * Passes on what PostgreSQL notifies to the open streams of this process, over one connection for all of them.
 * Who listens reads the state of the row for itself: a notification says only that there is news.
 */
class EventHub {
  private readonly listeners = new Map<string, Set<() => void>>();
  private readonly streams = new Set<() => void>();
  private listening: Listening | null = null;

  /**
   * @param onNews called for each notification about the trial, and after the connection was taken up again, when some
   *               may have been missed
   * @returns ends it
   */
  subscribe(trialId: string, onNews: () => void): () => void {
    this.listening ??= listen(
      process.env.DATABASE_URL,
      [TRIAL_PROGRESS],
      (_, id) => this.listeners.get(id)?.forEach((tell) => tell()),
      () => this.listeners.forEach((those) => those.forEach((tell) => tell())),
    );
    const those = this.listeners.get(trialId) ?? new Set();
    this.listeners.set(trialId, those.add(onNews));
    return () => {
      those.delete(onNews);
      if (those.size === 0 && this.listeners.get(trialId) === those) this.listeners.delete(trialId);
    };
  }

  /** Number of trials that somebody follows, for tests. */
  get followed(): number {
    return this.listeners.size;
  }

  /** Has a stream closed with the process. @returns forgets it */
  keep(close: () => void): () => void {
    this.streams.add(close);
    return () => this.streams.delete(close);
  }

  /** An open stream keeps the server from ending for half a minute: it is asked to close first. */
  async closeAllStreams(): Promise<void> {
    for (const close of [...this.streams]) close();
    const own = this.listening;
    this.listening = null;
    await own?.stop();
  }
}

// Kept on globalThis: a development server evaluates modules again at every change.
const kept = globalThis as typeof globalThis & { levelbookEvents?: EventHub };

function newHub(): EventHub {
  const hub = new EventHub();
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, () => void hub.closeAllStreams());
  return hub;
}

export const eventHub = (): EventHub => (kept.levelbookEvents ??= newHub());
