'use client';

import { moment } from '@/lib/entries/dates';
import type { DraftContent } from '@/lib/entries/draft-content';
import type { KeptDraft } from './use-kept-draft';

/** Whether the server has what is typed, in a few words beside the call number. */
export function KeepingLine({ keeping, updatedAt }: Pick<KeptDraft, 'keeping'> & { updatedAt: string }) {
  return (
    <span role="status" className={keeping.kind === 'unsaved' || keeping.kind === 'conflict' ? 'red' : undefined}>
      {keeping.kind === 'kept' && `kept, ${moment(updatedAt)}`}
      {keeping.kind === 'saving' && 'being kept …'}
      {keeping.kind === 'unsaved' && 'not saved yet'}
      {keeping.kind === 'conflict' && 'changed elsewhere'}
    </span>
  );
}

const PARTS = {
  title: 'Title',
  gist: 'Gist',
  synonyms: 'Other names',
  definition: 'Definition',
  notes: 'Notes',
  references: 'References',
  changeNote: 'Note of the change',
} as const satisfies Record<keyof DraftContent, string>;

const textOf = (value: unknown) => (typeof value === 'string' ? value : JSON.stringify(value, null, 1));

const BothTexts = ({ mine, theirs }: { mine: DraftContent; theirs: DraftContent }) => (
  <table className="both">
    <thead>
      <tr>
        <th scope="col">Part</th>
        <th scope="col">Yours, in this window</th>
        <th scope="col">Kept meanwhile</th>
      </tr>
    </thead>
    <tbody>
      {(Object.keys(PARTS) as (keyof DraftContent)[])
        .filter((part) => textOf(mine[part]) !== textOf(theirs[part]))
        .map((part) => (
          <tr key={part}>
            <th scope="row">{PARTS[part]}</th>
            <td>
              <pre>{textOf(mine[part])}</pre>
            </td>
            <td>
              <pre>{textOf(theirs[part])}</pre>
            </td>
          </tr>
        ))}
    </tbody>
  </table>
);

/** What hinders the keeping, in sentences, with what can be done. */
export function KeepingBanner({ kept }: { kept: KeptDraft }) {
  const { keeping, aside, content } = kept;
  if (keeping.kind === 'unsaved')
    return (
      <div className="banner" role="alert">
        <p>
          <b>Not saved yet.</b> {keeping.why}
        </p>
        {keeping.isAgain && (
          <button type="button" className="word" onClick={() => void kept.flush()}>
            Try now
          </button>
        )}
      </div>
    );
  if (keeping.kind === 'conflict')
    return (
      <div className="banner" role="alert">
        <p>
          <b>This draft was changed in another window while you wrote here</b>, {moment(keeping.theirs.at)}. Nothing is
          lost: both texts are below. Nothing more is kept until you choose.
        </p>
        <BothTexts mine={content} theirs={keeping.theirs.content} />
        <div className="acts">
          <button type="button" className="btn" onClick={kept.keepMine}>
            Keep mine
          </button>
          <button type="button" className="btn" onClick={kept.takeTheirs}>
            Take the other
          </button>
        </div>
      </div>
    );
  if (aside)
    return (
      <details className="banner plain">
        <summary>The text that was set aside is still here</summary>
        <BothTexts mine={aside} theirs={content} />
        <button type="button" className="btn" onClick={kept.bringBack}>
          Exchange the two
        </button>
      </details>
    );
  return null;
}
