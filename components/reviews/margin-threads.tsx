'use client';

import { type RefObject, useEffect, useRef } from 'react';
import type { ShownThread } from './part-remarks';
import type { RemarkActions } from './remark-actions';
import { Thread } from './thread';

interface MarginThreadsProps {
  code: RefObject<HTMLPreElement | null>;
  /** Each with the number of the line it stands beside. */
  threads: readonly (ShownThread & { line: number })[];
  actions: RemarkActions;
}

const GAP = 12;
const LINE_HEIGHT = 24;

/** Sets each thread level with its line, and below the one before where that is in the way. */
function place(code: HTMLElement, margin: HTMLElement) {
  const top = margin.getBoundingClientRect().top;
  let free = 0;
  for (const child of margin.children) {
    const thread = child as HTMLElement;
    const line = code.querySelector<HTMLElement>(`[data-line="${thread.dataset.beside}"]`);
    // Changed lines are taller: the text stands at the foot of its line.
    const wanted = line ? line.getBoundingClientRect().bottom - LINE_HEIGHT - top : 0;
    const at = Math.max(wanted, free);
    thread.style.top = `${at}px`;
    free = at + thread.offsetHeight + GAP;
  }
  margin.style.minHeight = `${free}px`;
}

/** Threads in the right margin of a kernel, each on a leader to its line; on narrow pages one after another. */
export function MarginThreads({ code, threads, actions }: MarginThreadsProps) {
  const margin = useRef<HTMLDivElement>(null);
  useEffect(() => {
    const [text, column] = [code.current, margin.current];
    if (!text || !column) return;
    const arrange = () => place(text, column);
    const watch = new ResizeObserver(arrange);
    watch.observe(text);
    for (const thread of column.children) watch.observe(thread);
    return () => watch.disconnect();
  }, [code, threads]);
  const inOrder = threads.toSorted((a, b) => a.line - b.line);
  return (
    <div className="marginal" ref={margin}>
      {inOrder.map(({ thread, obstacle, line }) => (
        <div key={thread.id} data-beside={line}>
          <Thread
            thread={thread}
            obstacle={obstacle}
            actions={actions}
            place={line === thread.line ? `line ${line}` : `line ${line}, then ${thread.line}`}
          />
        </div>
      ))}
    </div>
  );
}
