'use client';

import { useId } from 'react';

/** The author's notes in Markdown. */
export function NotesPart({ notes, isReadOnly, onChange }: { notes: string; isReadOnly: boolean; onChange: (notes: string) => void }) {
  const id = useId();
  return (
    <div className="field">
      <label htmlFor={id}>Notes and derivation</label>
      <textarea
        id={id}
        rows={10}
        value={notes}
        maxLength={40_000}
        readOnly={isReadOnly}
        aria-describedby={`${id}-hint`}
        onChange={(event) => onChange(event.target.value)}
      />
      <p className="hint" id={`${id}-hint`}>
        Markdown: headings, lists, emphasis, code, links, tables. HTML is shown as it is typed.
      </p>
    </div>
  );
}
