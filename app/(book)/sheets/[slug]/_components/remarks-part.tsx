'use client';

import { useId, useState } from 'react';
import { RemarkForm } from '@/components/reviews/remark-form';
import { Thread } from '@/components/reviews/thread';
import type { ShownThread } from '@/components/reviews/part-remarks';
import type { RemarkActions } from '@/components/reviews/remark-actions';
import { REMARK_PART_WORDS, type RemarkPart, remarkPlace } from '@/lib/reviews/remark-part';
import { Part } from './part';

interface RemarksPartProps {
  figure: number;
  revisionId: string;
  /** Parts that this sheet has. */
  parts: readonly RemarkPart[];
  threads: readonly ShownThread[];
  actions: RemarkActions;
}

function NewRemark({
  revisionId,
  parts,
  actions,
  close,
}: Omit<RemarksPartProps, 'figure' | 'threads'> & { close: () => void }) {
  const id = useId();
  const [part, setPart] = useState<RemarkPart>('sheet');
  return (
    <RemarkForm
      label="Remark"
      button="Remark"
      send={(text) => actions.write({ revisionId, part, text })}
      onClose={close}
    >
      <div className="field">
        <label htmlFor={id}>On</label>
        <select id={id} value={part} onChange={(event) => setPart(event.target.value as RemarkPart)}>
          {parts.map((one) => (
            <option key={one} value={one}>
              {REMARK_PART_WORDS[one]}
            </option>
          ))}
        </select>
      </div>
    </RemarkForm>
  );
}

/** What people said of this revision; whoever is signed in may add to it. */
export function RemarksPart({ figure, threads, ...rest }: RemarksPartProps) {
  const [isWriting, setIsWriting] = useState(false);
  return (
    <Part id="remarks" figure={figure} name="Remarks">
      {threads.length === 0 && <p className="cap">Nobody has remarked on this sheet.</p>}
      {threads.map(({ thread, obstacle }) => (
        <div key={thread.id} className="sheetthread">
          {thread.quote !== null && (
            <p className="small q">
              {remarkPlace(thread.part, thread.line)}: <code>{thread.quote.trim()}</code>
            </p>
          )}
          <Thread thread={thread} obstacle={obstacle} actions={rest.actions} />
        </div>
      ))}
      {isWriting ? (
        <NewRemark {...rest} close={() => setIsWriting(false)} />
      ) : (
        <div className="bar">
          <button type="button" className="btn" onClick={() => setIsWriting(true)}>
            Write a remark
          </button>
        </div>
      )}
    </Part>
  );
}
