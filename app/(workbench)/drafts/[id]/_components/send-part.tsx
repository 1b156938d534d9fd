'use client';

import { useState, useTransition } from 'react';
import { useRouter } from 'next/navigation';
import type { RevisionState } from '@/lib/entries/revision-state';
import type { SubmissionObstacle } from '@/lib/entries/submission-obstacles';
import { sendToReview, takeBack } from '../actions';

interface SendPartProps {
  draftId: string;
  state: RevisionState;
  isAuthor: boolean;
  obstacles: readonly SubmissionObstacle[];
  /** Keeps what is typed first, so that what is sent is what is seen. */
  flush: () => Promise<boolean>;
}

/** The way to the review desk, with all that stands in it. */
export function SendPart({ draftId, state, isAuthor, obstacles, flush }: SendPartProps) {
  const router = useRouter();
  const [refusal, setRefusal] = useState<string | null>(null);
  const [isBusy, start] = useTransition();
  const isOpen = state === 'draft' || state === 'returned';

  const send = () =>
    start(async () => {
      if (!(await flush())) {
        setRefusal('This text is not saved yet. It is sent once it is.');
        return;
      }
      const answer = await sendToReview({ revisionId: draftId });
      setRefusal(answer.ok ? null : answer.message);
      if (answer.ok) router.refresh();
    });
  const back = () =>
    start(async () => {
      const answer = await takeBack({ revisionId: draftId });
      setRefusal(answer.ok ? null : answer.message);
      if (answer.ok) router.refresh();
    });

  if (!isAuthor) return null;
  return (
    <div className="sendpart">
      {isOpen && obstacles.length > 0 && (
        <>
          <p className="cap" id="hinders">
            What still hinders the review:
          </p>
          <ul aria-labelledby="hinders">
            {obstacles.map(({ sentence, place }) => (
              <li key={sentence}>
                <a href={`#${place}`}>{sentence}</a>
              </li>
            ))}
          </ul>
        </>
      )}
      <div className="acts">
        {isOpen && (
          <button type="button" className="btn main" disabled={obstacles.length > 0 || isBusy} onClick={send}>
            Send to review
          </button>
        )}
        {state === 'in-review' && (
          <button type="button" className="btn" disabled={isBusy} onClick={back}>
            Take it back
          </button>
        )}
      </div>
      {refusal && (
        <p className="fail small" role="alert">
          {refusal}
        </p>
      )}
    </div>
  );
}
