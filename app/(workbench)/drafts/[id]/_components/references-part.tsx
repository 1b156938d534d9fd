'use client';

import { useId, useState } from 'react';
import type { DraftContent } from '@/lib/entries/draft-content';
import { ReferenceInput } from '@/lib/entries/draft-content';
import { doiOf } from '@/lib/entries/doi';
import { HeldInput } from './held-input';

type Reference = DraftContent['references'][number];

interface ReferencesPartProps {
  references: readonly Reference[];
  isReadOnly: boolean;
  onChange: (references: Reference[]) => void;
}

const BLANK: Reference = { authors: '', title: '', source: '', year: new Date().getFullYear(), doi: null, note: null };

/** The literature: from BibTeX, or by hand. */
export function ReferencesPart({ references, isReadOnly, onChange }: ReferencesPartProps) {
  const id = useId();
  const [text, setText] = useState('');
  const [problem, setProblem] = useState<string | null>(null);

  const read = async () => {
    // Loaded when asked for: most visits to a draft read no BibTeX.
    const { referencesFromBibtex } = await import('@/lib/entries/reference-from-bibtex');
    const outcome = referencesFromBibtex(text);
    setProblem('problem' in outcome ? outcome.problem : null);
    if ('problem' in outcome) return;
    onChange([...references, ...outcome.references]);
    setText('');
  };

  return (
    <div id="references">
      <ol className="reflist" aria-label="References">
        {references.map((reference, k) => (
          <ReferenceFields
            key={k}
            figure={k + 1}
            reference={reference}
            isReadOnly={isReadOnly}
            onChange={(next) => onChange(references.map((old, j) => (j === k ? next : old)))}
            onDrop={() => onChange(references.filter((_, j) => j !== k))}
          />
        ))}
      </ol>
      {!isReadOnly && (
        <>
          <div className={problem ? 'field bad' : 'field'}>
            <label htmlFor={id}>Add from BibTeX</label>
            <textarea
              id={id}
              rows={4}
              value={text}
              spellCheck={false}
              aria-invalid={problem ? true : undefined}
              aria-describedby={`${id}-hint`}
              onChange={(event) => setText(event.target.value)}
            />
            <p className="hint" id={`${id}-hint`} role={problem ? 'alert' : undefined}>
              {problem
                ? `${problem.charAt(0).toUpperCase()}${problem.slice(1)}.`
                : 'One or more entries, as libraries and journals give them.'}
            </p>
          </div>
          <div className="filebar">
            <button type="button" className="btn" disabled={text.trim() === ''} onClick={() => void read()}>
              Add these references
            </button>
            <button type="button" className="btn lite" onClick={() => onChange([...references, BLANK])}>
              Add one by hand
            </button>
          </div>
        </>
      )}
    </div>
  );
}

interface ReferenceFieldsProps {
  figure: number;
  reference: Reference;
  isReadOnly: boolean;
  onChange: (reference: Reference) => void;
  onDrop: () => void;
}

function ReferenceFields({ figure, reference, isReadOnly, onChange, onDrop }: ReferenceFieldsProps) {
  const id = useId();
  const parsed = ReferenceInput.safeParse(reference);
  const fault = parsed.success ? null : (parsed.error.issues[0]?.message ?? null);
  const field = (
    name: 'authors' | 'title' | 'source' | 'year' | 'doi',
    label: string,
    take: (text: string) => Partial<Reference>,
  ) => (
    <div className="field">
      <label htmlFor={`${id}-${name}`}>{label}</label>
      <HeldInput
        id={`${id}-${name}`}
        value={String(reference[name] ?? '')}
        readOnly={isReadOnly}
        aria-label={`${label} of reference ${figure}`}
        onText={(text) => onChange({ ...reference, ...take(text) })}
      />
    </div>
  );
  return (
    <li>
      <div className="reffields">
        {field('authors', 'Authors', (authors) => ({ authors }))}
        {field('title', 'Title', (title) => ({ title }))}
        {field('source', 'Journal or publisher', (source) => ({ source }))}
        {field('year', 'Year', (text) => ({ year: Number(text) || 0 }))}
        {field('doi', 'DOI', (text) => ({ doi: text.trim() === '' ? null : (doiOf(text) ?? text.trim()) }))}
      </div>
      {fault && (
        <p className="fail small" role="alert">
          Reference {figure}: {fault}
        </p>
      )}
      {!isReadOnly && (
        <button type="button" className="word" aria-label={`Drop reference ${figure}`} onClick={onDrop}>
          drop
        </button>
      )}
    </li>
  );
}
