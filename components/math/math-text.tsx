import type { MathRun } from '@/lib/facts/reading-texts';

/** Mathematics in running text: letters italic, signs and figures upright. */
export function MathText({ runs }: { runs: readonly MathRun[] }) {
  if (runs.every((run) => !run.italic)) return runs.map((run) => run.text).join('');
  return <span className="m">{runs.map((run, k) => (run.italic ? run.text : <b key={k}>{run.text}</b>))}</span>;
}
