'use client';

import { useId, useState } from 'react';
import type { Definition } from '@/lib/entries/definition';
import type { LineError } from '@/lib/entries/definition-csv';
import { definitionJson, readDefinitionJson } from '@/lib/entries/definition-json';
import { LineErrors } from './line-errors';

interface JsonEditorProps {
  definition: Definition;
  isReadOnly: boolean;
  onChange: (definition: Definition) => void;
}

/** The definition as the document that it is. Text that cannot be read stays as typed and changes nothing. */
export function JsonEditor({ definition, isReadOnly, onChange }: JsonEditorProps) {
  const id = useId();
  const [typed, setTyped] = useState<string | null>(null);
  const [errors, setErrors] = useState<readonly LineError[]>([]);
  const text = typed ?? definitionJson(definition);
  const take = (next: string) => {
    setTyped(next);
    const outcome = readDefinitionJson(next, definition);
    setErrors('errors' in outcome ? outcome.errors : []);
    if ('definition' in outcome) onChange(outcome.definition);
  };
  return (
    <div className={errors.length > 0 ? 'field bad jsonfield' : 'field jsonfield'}>
      <label htmlFor={id}>Definition as JSON</label>
      <textarea
        id={id}
        rows={Math.min(32, Math.max(12, text.split('\n').length))}
        value={text}
        readOnly={isReadOnly}
        spellCheck={false}
        autoCapitalize="off"
        aria-invalid={errors.length > 0 || undefined}
        aria-describedby={`${id}-errors`}
        onChange={(event) => take(event.target.value)}
        onBlur={() => {
          if (errors.length === 0) setTyped(null);
        }}
      />
      <LineErrors id={`${id}-errors`} errors={errors} />
    </div>
  );
}
