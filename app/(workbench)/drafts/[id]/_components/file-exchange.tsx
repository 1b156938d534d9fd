'use client';

import { useId, useState } from 'react';
import type { Definition } from '@/lib/entries/definition';
import { definitionCsv, FILE_CHARACTERS_MAX, type LineError, readDefinitionCsv } from '@/lib/entries/definition-csv';
import { definitionJson, readDefinitionJson } from '@/lib/entries/definition-json';
import { LineErrors } from './line-errors';

interface FileExchangeProps {
  definition: Definition;
  slug: string;
  isReadOnly: boolean;
  onChange: (definition: Definition) => void;
}

function save(text: string, name: string, type: string): void {
  const address = URL.createObjectURL(new Blob([text], { type }));
  const link = Object.assign(document.createElement('a'), { href: address, download: name });
  link.click();
  URL.revokeObjectURL(address);
}

/** The definition from a file and into a file. A file with faults changes nothing; each fault is told with its line. */
export function FileExchange({ definition, slug, isReadOnly, onChange }: FileExchangeProps) {
  const id = useId();
  const [said, setSaid] = useState('');
  const [errors, setErrors] = useState<readonly LineError[]>([]);
  const csv = definitionCsv(definition);

  const read = async (file: File) => {
    setSaid('');
    // Four bytes a character at most: a larger file is not even opened.
    if (file.size > 4 * FILE_CHARACTERS_MAX) {
      setErrors([
        {
          line: 0,
          message: `${file.name} has ${file.size} bytes; accepted: CSV or JSON of at most ${FILE_CHARACTERS_MAX} characters`,
        },
      ]);
      return;
    }
    const text = await file.text();
    const isJson = /\.json$/i.test(file.name) || /^\s*[{[]/.test(text);
    const outcome = isJson ? readDefinitionJson(text, definition) : readDefinitionCsv(text, definition);
    if ('errors' in outcome) setErrors(outcome.errors);
    else {
      setErrors([]);
      setSaid(`${file.name} was read.`);
      onChange(outcome.definition);
    }
  };

  return (
    <div>
      <div className="filebar">
        {!isReadOnly && (
          <span className="field">
            <label htmlFor={id}>Read a file, CSV or JSON</label>
            <input
              id={id}
              type="file"
              accept=".csv,.json,text/csv,application/json"
              aria-describedby={`${id}-errors`}
              onChange={(event) => {
                const [file] = event.target.files ?? [];
                event.target.value = '';
                if (file) void read(file);
              }}
            />
          </span>
        )}
        {csv !== null && (
          <button type="button" className="word" onClick={() => save(csv, `${slug}.csv`, 'text/csv')}>
            Save as CSV
          </button>
        )}
        <button
          type="button"
          className="word"
          onClick={() => save(definitionJson(definition), `${slug}.json`, 'application/json')}
        >
          Save as JSON
        </button>
      </div>
      <p role="status" className="small q">
        {said}
      </p>
      <LineErrors id={`${id}-errors`} errors={errors} />
    </div>
  );
}
