/** The engine in a web worker of the browser: a definition in, its live analysis out, marked by the number of the question. */
import { type LiveAnalysis, liveAnalysis } from './live-analysis';

export interface Question {
  readonly mark: number;
  readonly definition: unknown;
}
export type Answer =
  | { readonly mark: number; readonly analysis: LiveAnalysis }
  /** A fault of the engine: its text is for the console, the page says that there are no facts. */
  | { readonly mark: number; readonly fault: string };

self.addEventListener('message', (event: MessageEvent<Question>) => {
  const { mark, definition } = event.data;
  let answer: Answer;
  try {
    answer = { mark, analysis: liveAnalysis(definition) };
  } catch (error) {
    answer = { mark, fault: error instanceof Error ? error.message : String(error) };
  }
  self.postMessage(answer);
});
