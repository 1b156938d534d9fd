'use client';

import { useId } from 'react';
import type { DraftContent } from '@/lib/entries/draft-content';
import { HeldInput } from './held-input';

interface WordsPartProps {
  content: DraftContent;
  isReadOnly: boolean;
  isFirst: boolean;
  onChange: (part: Partial<DraftContent>) => void;
}

/** Title, gist, other names, note of the change. */
export function WordsPart({ content, isReadOnly, isFirst, onChange }: WordsPartProps) {
  const id = useId();
  const isUntitled = content.title.trim() === '';
  return (
    <div className="words">
      <div className={isUntitled ? 'field bad' : 'field'}>
        <label htmlFor={`${id}-title`}>Title</label>
        <input
          id={`${id}-title`}
          value={content.title}
          maxLength={200}
          readOnly={isReadOnly}
          aria-invalid={isUntitled || undefined}
          aria-describedby={isUntitled ? `${id}-title-hint` : undefined}
          onChange={(event) => onChange({ title: event.target.value })}
        />
        {isUntitled && (
          <p className="hint" id={`${id}-title-hint`}>
            A draft has a title of 1 to 200 characters.
          </p>
        )}
      </div>
      <div className="field">
        <label htmlFor={`${id}-gist`}>Gist</label>
        <input
          id={`${id}-gist`}
          value={content.gist}
          maxLength={400}
          readOnly={isReadOnly}
          aria-describedby={`${id}-gist-hint`}
          onChange={(event) => onChange({ gist: event.target.value })}
        />
        <p className="hint" id={`${id}-gist-hint`}>
          One or two sentences: what it means for the run.
        </p>
      </div>
      <div className="field">
        <label htmlFor={`${id}-names`}>Other names</label>
        <HeldInput
          id={`${id}-names`}
          value={content.synonyms.join('; ')}
          readOnly={isReadOnly}
          aria-describedby={`${id}-names-hint`}
          onText={(text) =>
            onChange({
              synonyms: text
                .split(';')
                .map((name) => name.trim())
                .filter(Boolean),
            })
          }
        />
        <p className="hint" id={`${id}-names-hint`}>
          As people look for it, parted by semicolons.
        </p>
      </div>
      {!isFirst && (
        <div className="field">
          <label htmlFor={`${id}-change`}>What changed against the revision before</label>
          <input
            id={`${id}-change`}
            value={content.changeNote}
            maxLength={400}
            readOnly={isReadOnly}
            onChange={(event) => onChange({ changeNote: event.target.value })}
          />
        </div>
      )}
    </div>
  );
}
