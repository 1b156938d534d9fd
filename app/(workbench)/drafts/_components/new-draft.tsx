'use client';

import type { Route } from 'next';
import { useRouter } from 'next/navigation';
import { useId, useState, useTransition } from 'react';
import { Options } from '@/components/ui/options';
import { useHydrated } from '@/components/ui/use-hydrated';
import type { VettedEntry } from '@/db/queries/drafts';
import { BLANK_NAMES, BLANKS, type Blank, SYSTEM_EQUATIONS } from '@/lib/entries/blank-definition';
import { EQUATION_NAMES } from '@/lib/entries/catalog-conditions';
import { EQUATIONS, type Equation } from '@/lib/numerics/equation';
import { beginDraft } from '../actions';

const WAYS = { blank: 'from a blank sheet', next: 'next revision', copy: 'copy' };
type Way = keyof typeof WAYS;

const needsEquation = (blank: Blank) => blank === 'table' || blank === 'lines' || blank === 'system';

/** The three ways to begin: blank, as the next revision of an entry, as a copy of one. */
export function NewDraft({ entries, from }: { entries: readonly VettedEntry[]; from: string | null }) {
  const id = useId();
  const router = useRouter();
  const isHydrated = useHydrated();
  const [isBeginning, begin] = useTransition();
  const [way, setWay] = useState<Way>(from ? 'next' : 'blank');
  const [blank, setBlank] = useState<Blank>('table');
  const [equation, setEquation] = useState<Equation>('advection');
  const [slug, setSlug] = useState(from ?? entries[0]?.slug ?? '');
  const [title, setTitle] = useState('');
  const [fault, setFault] = useState<{ message: string; title?: string } | null>(null);
  const equations = blank === 'system' ? SYSTEM_EQUATIONS : EQUATIONS;
  const chosen = equations.includes(equation) ? equation : equations[0]!;

  const send = () =>
    begin(async () => {
      const answer = await beginDraft(
        way === 'blank'
          ? { kind: 'blank', blank, equation: chosen, title }
          : way === 'next'
            ? { kind: 'next', slug }
            : { kind: 'copy', slug, title },
      );
      if (answer.ok) router.push(`/drafts/${answer.value.revisionId}` as Route);
      else setFault({ message: answer.message, title: answer.fields['title'] });
    });

  return (
    <form
      className="newdraft"
      onSubmit={(event) => {
        event.preventDefault();
        send();
      }}
    >
      <p>
        <Options title="Begin" words={WAYS} value={way} onValue={(value) => setWay(value as Way)} />
      </p>
      {way === 'blank' ? (
        <>
          <div className="field">
            <label htmlFor={`${id}-blank`}>Kind</label>
            <select id={`${id}-blank`} value={blank} onChange={(event) => setBlank(event.target.value as Blank)}>
              {BLANKS.map((one) => (
                <option key={one} value={one}>
                  {BLANK_NAMES[one]}
                </option>
              ))}
            </select>
          </div>
          {needsEquation(blank) && (
            <div className="field">
              <label htmlFor={`${id}-equation`}>Equation</label>
              <select
                id={`${id}-equation`}
                value={chosen}
                onChange={(event) => setEquation(event.target.value as Equation)}
              >
                {equations.map((one) => (
                  <option key={one} value={one}>
                    {EQUATION_NAMES[one]}
                  </option>
                ))}
              </select>
            </div>
          )}
        </>
      ) : (
        <div className="field">
          <label htmlFor={`${id}-entry`}>{way === 'next' ? 'Entry to revise' : 'Entry to copy'}</label>
          <select id={`${id}-entry`} value={slug} onChange={(event) => setSlug(event.target.value)}>
            {entries.map((entry) => (
              <option key={entry.slug} value={entry.slug}>
                {entry.callNumber} {entry.title}, revision {entry.revision}
              </option>
            ))}
          </select>
        </div>
      )}
      {way !== 'next' && (
        <div className={fault?.title ? 'field bad' : 'field'}>
          <label htmlFor={`${id}-title`}>Title</label>
          <input
            id={`${id}-title`}
            value={title}
            maxLength={200}
            aria-describedby={`${id}-title-hint`}
            aria-invalid={fault?.title ? true : undefined}
            onChange={(event) => setTitle(event.target.value)}
          />
          <p className="hint" id={`${id}-title-hint`}>
            {fault?.title ?? 'The usual name, such as Lax–Wendroff. The address of the sheet is made of it.'}
          </p>
        </div>
      )}
      <div className="bar">
        <button type="submit" className="btn main" disabled={!isHydrated || isBeginning}>
          Begin the draft
        </button>
        {fault && (
          <p className="fail small" role="alert">
            {fault.message}
          </p>
        )}
      </div>
    </form>
  );
}
