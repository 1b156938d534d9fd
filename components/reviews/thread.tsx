'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { Prose } from '@/components/ui/prose';
import { shortDate } from '@/lib/entries/dates';
import type { RemarkThread } from '@/lib/reviews/remark';
import { remarkPlace } from '@/lib/reviews/remark-part';
import type { RemarkActions } from './remark-actions';
import { RemarkForm } from './remark-form';

interface ThreadProps {
  thread: RemarkThread;
  actions: RemarkActions;
  /** Why this reader cannot settle or reopen it; null where they can. */
  obstacle: string | null;
  /** Where it stands, where that is not plain from its place. */
  place?: string;
}

/** A remark with its answers; settled ones are folded to one line. */
export function Thread({ thread, actions, obstacle, place = remarkPlace(thread.part, thread.line) }: ThreadProps) {
  const router = useRouter();
  const [isAnswering, setIsAnswering] = useState(false);
  const [isOpen, setIsOpen] = useState(thread.settledAt === null);
  const [refusal, setRefusal] = useState<string | null>(null);
  const [isMoving, start] = useTransition();
  const isSettled = thread.settledAt !== null;

  const move = (to: 'settle' | 'reopen') =>
    start(async () => {
      const answer = await actions[to]({ remarkId: thread.id });
      setRefusal(answer.ok ? null : answer.message);
      if (answer.ok) setIsOpen(to === 'reopen');
      router.refresh();
    });

  if (isSettled && !isOpen) {
    return (
      <article className="thread settled" aria-label={`Settled remark of ${thread.author} on ${place}`}>
        <p>
          <b>{thread.author}</b> · {place}
          <br />
          settled by {thread.settledBy}, {shortDate(thread.settledAt ?? thread.at)}{' '}
          <button type="button" className="word" onClick={() => setIsOpen(true)}>
            Show
          </button>
        </p>
      </article>
    );
  }
  return (
    <article className="thread" aria-label={`Remark of ${thread.author} on ${place}`}>
      <p>
        <b>{thread.author}</b> · {place} <span className="qq">{shortDate(thread.at)}</span>
      </p>
      <Prose text={thread.text} />
      {thread.answers.map((answer) => (
        <div key={answer.id} className="reply">
          <p>
            <b>{answer.author}</b> <span className="qq">{shortDate(answer.at)}</span>
          </p>
          <Prose text={answer.text} />
        </div>
      ))}
      {isSettled && <p className="qq">settled by {thread.settledBy}</p>}
      {refusal && (
        <p className="fail" role="alert">
          {refusal}
        </p>
      )}
      {isAnswering ? (
        <RemarkForm
          label={`Answer to ${thread.author}`}
          button="Answer"
          send={(text) => actions.answer({ remarkId: thread.id, text })}
          onClose={() => setIsAnswering(false)}
        />
      ) : (
        <p className="threadacts">
          <button type="button" className="word" onClick={() => setIsAnswering(true)}>
            Answer
          </button>
          {obstacle === null && (
            <button
              type="button"
              className="word"
              disabled={isMoving}
              onClick={() => move(isSettled ? 'reopen' : 'settle')}
            >
              {isSettled ? 'Reopen' : 'Settle'}
            </button>
          )}
        </p>
      )}
    </article>
  );
}
