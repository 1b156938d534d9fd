'use client';

import { useState } from 'react';
import type { RemarkThread } from '@/lib/reviews/remark';
import { REMARK_PART_WORDS, type RemarkPart } from '@/lib/reviews/remark-part';
import type { RemarkActions } from './remark-actions';
import { RemarkForm } from './remark-form';
import { Thread } from './thread';

/** A thread as this reader may treat it. */
export interface ShownThread {
  thread: RemarkThread;
  /** Why this reader cannot settle or reopen it. */
  obstacle: string | null;
}

interface PartRemarksProps {
  revisionId: string;
  part: RemarkPart;
  threads: readonly ShownThread[];
  actions: RemarkActions;
}

/** The remarks on one part, and the way to add one. */
export function PartRemarks({ revisionId, part, threads, actions }: PartRemarksProps) {
  const [isWriting, setIsWriting] = useState(false);
  const label = `Remark on ${part === 'sheet' ? '' : 'the '}${REMARK_PART_WORDS[part]}`;
  return (
    <>
      {threads.map(({ thread, obstacle }) => (
        <Thread key={thread.id} thread={thread} obstacle={obstacle} actions={actions} />
      ))}
      {isWriting ? (
        <RemarkForm
          label={label}
          button="Remark"
          send={(text) => actions.write({ revisionId, part, text })}
          onClose={() => setIsWriting(false)}
        />
      ) : (
        <button type="button" className="word small" onClick={() => setIsWriting(true)}>
          {label}
        </button>
      )}
    </>
  );
}
