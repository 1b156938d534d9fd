/** The browser's side of the engine's worker: the latest question counts, an earlier one under way is given up. */
import type { Answer, Question } from './analysis-worker';
import type { LiveAnalysis } from './live-analysis';

export type Heard = { kind: 'analysis'; analysis: LiveAnalysis } | { kind: 'fault'; message: string };

const ATTEMPTS = 4;
const AGAIN_MS = 700;

const openWorker = () => new Worker(new URL('./analysis-worker.ts', import.meta.url), { type: 'module' });

export class AnalysisClient {
  private worker: Worker | null = null;
  /** Loaded beforehand, so that giving up a question costs no start. */
  private spare: Worker | null = null;
  private mark = 0;
  private isBusy = false;
  private again: ReturnType<typeof setTimeout> | undefined;

  /** Asks about a definition; `hear` is called once, unless another question comes first. */
  ask(definition: unknown, hear: (heard: Heard) => void): void {
    this.tryToAsk(definition, hear, 1);
  }

  private tryToAsk(definition: unknown, hear: (heard: Heard) => void, attempt: number): void {
    clearTimeout(this.again);
    if (this.isBusy) this.giveUp();
    const worker = (this.worker ??= openWorker());
    this.spare ??= openWorker();
    const mark = ++this.mark;
    this.isBusy = true;
    worker.onmessage = (event: MessageEvent<Answer>) => {
      if (event.data.mark !== mark) return;
      this.isBusy = false;
      if ('analysis' in event.data) hear({ kind: 'analysis', analysis: event.data.analysis });
      else hear({ kind: 'fault', message: event.data.fault });
    };
    worker.onerror = (event) => {
      event.preventDefault();
      this.close();
      // A worker that could not be fetched is often there a moment later.
      if (attempt < ATTEMPTS)
        this.again = setTimeout(() => this.tryToAsk(definition, hear, attempt + 1), AGAIN_MS * attempt);
      else hear({ kind: 'fault', message: event.message });
    };
    worker.postMessage({ mark, definition } satisfies Question);
  }

  private giveUp(): void {
    this.worker?.terminate();
    this.worker = this.spare;
    this.spare = null;
    this.isBusy = false;
  }

  close(): void {
    clearTimeout(this.again);
    this.worker?.terminate();
    this.spare?.terminate();
    this.worker = this.spare = null;
    this.isBusy = false;
  }
}
