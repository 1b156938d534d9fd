'use client';

import { useId } from 'react';
import { LANGUAGE_NAMES } from '@/components/trials/finding-rows';
import type { KernelLanguage } from '@/lib/codegen/kernel-request';
import type { RemarkActions } from './remark-actions';
import { RemarkForm } from './remark-form';

interface LineRemarkFormProps {
  revisionId: string;
  language: KernelLanguage;
  lines: readonly string[];
  chosen: number;
  setChosen: (line: number | null) => void;
  actions: RemarkActions;
}

/** A remark on a line of the kernel that is shown; the line's own words go with it. */
export function LineRemarkForm({ revisionId, language, lines, chosen, setChosen, actions }: LineRemarkFormProps) {
  const id = useId();
  const quote = lines[chosen - 1];
  return (
    <RemarkForm
      label={`Remark on the kernel in ${LANGUAGE_NAMES[language]}`}
      button="Remark"
      send={async (text) =>
        quote === undefined
          ? { ok: false, message: `Choose a line from 1 to ${lines.length}.` }
          : actions.write({ revisionId, part: 'kernel', text, at: { language, line: chosen, quote } })
      }
      onClose={() => setChosen(null)}
    >
      <div className="field linefield">
        <label htmlFor={id}>Line</label>
        <input
          id={id}
          className="inp"
          type="number"
          min={1}
          max={lines.length}
          value={chosen || ''}
          onChange={(event) => setChosen(Number(event.target.value))}
          required
        />
        <code>{quote?.trim()}</code>
      </div>
    </RemarkForm>
  );
}
