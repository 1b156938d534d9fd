'use client';

import type { Route } from 'next';
import Link from 'next/link';
import { ActionForm } from '@/components/ui/action-form';
import { CopyText } from '@/components/ui/copy-text';
import { Field } from '@/components/ui/field';
import { dropCase, keepCase } from '../actions';

interface CasesProps {
  cases: readonly { id: string; name: string }[];
  /** The run shown now. */
  question: string;
  name: string;
  origin: string;
}

/** The runs this person keeps by name; each has a link that others can open. */
export function Cases({ cases, question, name, origin }: CasesProps) {
  return (
    <section className="cases" aria-label="Kept cases">
      <div className="leafhd">
        <span>Kept cases</span>
        <span>yours; the link opens for anyone here</span>
      </div>
      {cases.length > 0 && (
        <ul>
          {cases.map((kept) => (
            <li key={kept.id}>
              <Link prefetch={false} href={`/budget/cases/${kept.id}` as Route}>
                {kept.name}
              </Link>
              <CopyText className="word" text={`${origin}/budget/cases/${kept.id}`}>
                Copy link
              </CopyText>
              <ActionForm
                act={dropCase}
                submit="Take out"
                busy="Taking out"
                look="plain"
                label={`Take out ${kept.name}`}
                className="inline"
              >
                <input type="hidden" name="id" value={kept.id} />
              </ActionForm>
            </li>
          ))}
        </ul>
      )}
      <ActionForm
        act={keepCase}
        submit="Keep this run"
        busy="Keeping"
        look="plain"
        label="Keep this run"
        done={(kept) => `Kept as ${kept.name}.`}
      >
        <input type="hidden" name="question" value={question} />
        <Field label="Name of the case" name="name" defaultValue={name} maxLength={80} />
      </ActionForm>
    </section>
  );
}
