'use client';

import { useId, useState } from 'react';
import type { TableScheme } from '@/lib/entries/definition';
import { formulaOf, readFormula, type FormulaProblem } from '@/lib/entries/scheme-formula';

interface FormulaLineProps {
  definition: TableScheme;
  isReadOnly: boolean;
  onTerms: (terms: TableScheme['terms']) => void;
}

function lineOf(definition: TableScheme): string {
  try {
    return formulaOf(definition.terms);
  } catch {
    // A level that is no number yet has no formula; its field says so.
    return '';
  }
}

/** The scheme as one line of text, which may be typed instead of pointing; the sketch follows. */
export function FormulaLine({ definition, isReadOnly, onTerms }: FormulaLineProps) {
  const id = useId();
  const [typed, setTyped] = useState<string | null>(null);
  const [problem, setProblem] = useState<FormulaProblem | null>(null);
  const text = typed ?? lineOf(definition);

  const take = (next: string) => {
    setTyped(next);
    const outcome = readFormula(next, definition.equation, Object.keys(definition.fixed ?? {}));
    setProblem('problem' in outcome ? outcome.problem : null);
    if ('terms' in outcome) onTerms(outcome.terms);
  };
  return (
    <div className={problem ? 'field bad formulaline' : 'field formulaline'}>
      <label htmlFor={id}>Formula</label>
      <textarea
        id={id}
        rows={Math.min(6, Math.max(2, Math.ceil(text.length / 52)))}
        value={text}
        readOnly={isReadOnly}
        spellCheck={false}
        autoCapitalize="off"
        aria-invalid={problem ? true : undefined}
        aria-describedby={`${id}-hint`}
        onChange={(event) => take(event.target.value.replace(/\s*\n\s*/g, ' '))}
        onBlur={() => {
          if (!problem) setTyped(null);
        }}
      />
      <p className="hint" id={`${id}-hint`} role={problem ? 'alert' : undefined}>
        {problem
          ? `Column ${problem.column}: ${problem.message}.`
          : 'Written from the points and weights. Type here instead, and the sketch follows.'}
      </p>
      {problem && (
        <pre className="formulafault" aria-hidden="true">
          {text.slice(Math.max(0, problem.column - 30), problem.column + 20)}
          {'\n'}
          {' '.repeat(Math.min(problem.column - 1, problem.column - 1 - Math.max(0, problem.column - 30)))}^
        </pre>
      )}
    </div>
  );
}
