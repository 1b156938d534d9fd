'use client';

import { useId } from 'react';
import { useFieldFault } from './action-form';

interface Common {
  label: string;
  name: string;
  hint?: string;
}

/** A field within an ActionForm: label above, help below, and the fault in its place where there is one. */
export function Field({ label, name, hint, ...input }: Common & React.ComponentProps<'input'>) {
  const { id, fault, described, below } = useParts(name, hint);
  return (
    <div className={fault ? 'field bad' : 'field'}>
      <label htmlFor={id}>{label}</label>
      <input id={id} name={name} aria-invalid={fault !== null} aria-describedby={described} {...input} />
      {below}
    </div>
  );
}

/** A choice among words. */
export function Choice({
  label,
  name,
  hint,
  words,
  ...select
}: Common & { words: Readonly<Record<string, string>> } & React.ComponentProps<'select'>) {
  const { id, fault, described, below } = useParts(name, hint);
  return (
    <div className={fault ? 'field bad' : 'field'}>
      <label htmlFor={id}>{label}</label>
      <select id={id} name={name} aria-invalid={fault !== null} aria-describedby={described} {...select}>
        {Object.entries(words).map(([value, word]) => (
          <option key={value} value={value}>
            {word}
          </option>
        ))}
      </select>
      {below}
    </div>
  );
}

function useParts(name: string, hint: string | undefined) {
  const id = useId();
  const fault = useFieldFault(name);
  const text = fault ?? hint;
  return {
    id,
    fault,
    described: text ? `${id}-hint` : undefined,
    below: text && (
      <p className="hint" id={`${id}-hint`}>
        {text}
      </p>
    ),
  };
}
