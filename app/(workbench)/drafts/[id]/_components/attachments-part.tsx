'use client';

import { useId, useState, useTransition } from 'react';
import { useRouter } from 'next/navigation';
import {
  ACCEPTED,
  ATTACHMENT_BYTES_MAX,
  type AttachmentView,
  ATTACHMENTS_MAX,
  sizeText,
  TYPE_NAMES,
} from '@/lib/attachments/attachment';
import { removeAttachment } from '../actions';

interface AttachmentsPartProps {
  draftId: string;
  attachments: readonly AttachmentView[];
  isReadOnly: boolean;
}

async function send(draftId: string, file: File): Promise<string | null> {
  if (file.size > ATTACHMENT_BYTES_MAX) return `${file.name} is larger than 10 MB; ${ACCEPTED}.`;
  try {
    const query = new URLSearchParams({ revision: draftId, name: file.name });
    const answer = await fetch(`/attachments?${query}`, { method: 'POST', body: file });
    if (answer.ok) return null;
    const { detail } = (await answer.json()) as { detail?: string };
    return detail ?? `${file.name} was not taken; ${ACCEPTED}.`;
  } catch {
    return `The line to the server is cut, so ${file.name} was not sent. Choose it once more.`;
  }
}

/** Files that go with the draft. */
export function AttachmentsPart({ draftId, attachments, isReadOnly }: AttachmentsPartProps) {
  const id = useId();
  const router = useRouter();
  const [faults, setFaults] = useState<readonly string[]>([]);
  const [isBusy, start] = useTransition();

  const add = (files: readonly File[]) =>
    start(async () => {
      const found: string[] = [];
      for (const file of files) {
        const fault = await send(draftId, file);
        if (fault) found.push(fault);
      }
      setFaults(found);
      router.refresh();
    });
  const remove = (attachmentId: string) =>
    start(async () => {
      const answer = await removeAttachment({ id: attachmentId, revisionId: draftId });
      setFaults(answer.ok ? [] : [answer.message]);
      router.refresh();
    });

  return (
    <>
      {attachments.length > 0 && (
        <ul className="attachments" aria-label="Attachments">
          {attachments.map(({ id: attachmentId, name, type, bytes }) => (
            <li key={attachmentId}>
              <a href={`/attachments/${attachmentId}`} download={name}>
                {name}
              </a>
              <span>{TYPE_NAMES[type]}</span>
              <span className="num">{sizeText(bytes)}</span>
              {!isReadOnly && (
                <button
                  type="button"
                  className="word"
                  disabled={isBusy}
                  aria-label={`Take off ${name}`}
                  onClick={() => remove(attachmentId)}
                >
                  take off
                </button>
              )}
            </li>
          ))}
        </ul>
      )}
      {attachments.length === 0 && <p className="cap">No files go with this draft.</p>}
      {!isReadOnly && attachments.length < ATTACHMENTS_MAX && (
        <div className="field filebar">
          <label htmlFor={id}>Attach files</label>
          <input
            id={id}
            type="file"
            multiple
            accept=".pdf,.png,.svg,.csv"
            disabled={isBusy}
            aria-describedby={`${id}-hint`}
            onChange={(event) => {
              const files = [...(event.target.files ?? [])];
              event.target.value = '';
              add(files);
            }}
          />
          <p className="hint" id={`${id}-hint`}>
            {ACCEPTED.charAt(0).toUpperCase() + ACCEPTED.slice(1)}, told from what is in the file.
          </p>
        </div>
      )}
      {faults.map((fault) => (
        <p key={fault} className="fail small" role="alert">
          {fault}
        </p>
      ))}
    </>
  );
}
