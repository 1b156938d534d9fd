'use client';

import dynamic from 'next/dynamic';
import { useId, useState } from 'react';
import { Options } from '@/components/ui/options';

interface NotesPartProps {
  notes: string;
  isReadOnly: boolean;
  onChange: (notes: string) => void;
}

/** The setting of Markdown is loaded once somebody looks at it. */
const Markdown = dynamic(() => import('@/components/ui/markdown').then((module) => module.Markdown), {
  ssr: false,
  loading: () => <p className="cap">The notes are being set.</p>,
});

/** The author's notes in Markdown, as text and as they will be set. */
export function NotesPart({ notes, isReadOnly, onChange }: NotesPartProps) {
  const id = useId();
  const [view, setView] = useState('text');
  return (
    <div className="field">
      <p className="viewbar">
        <Options title="Notes" words={{ text: 'as text', set: 'as set' }} value={view} onValue={setView} />
      </p>
      {view === 'set' ? (
        <div className="setnotes">
          {notes.trim() === '' ? <p className="cap">Nothing is written yet.</p> : <Markdown text={notes} />}
        </div>
      ) : (
        <>
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
        </>
      )}
    </div>
  );
}
