'use client';

import { useState } from 'react';
import { Options } from '@/components/ui/options';
import type { BuildingBlock } from '@/db/queries/drafts';
import type { Definition } from '@/lib/entries/definition';
import type { DraftContent } from '@/lib/entries/draft-content';
import type { LiveAnalysis } from '@/lib/facts/live-analysis';
import { JsonEditor } from './json-editor';
import { TableEditor } from './table-editor';

export interface DefinitionEditorProps {
  definition: Definition;
  analysis: LiveAnalysis | null;
  at: { symbol: string; value: number } | null;
  blocks: readonly BuildingBlock[];
  notes: string;
  slug: string;
  isReadOnly: boolean;
  onChange: (definition: Definition, more?: Partial<DraftContent>) => void;
}

const VIEWS = { drawn: 'drawn', json: 'JSON' };

/** The editor that belongs to the kind of the draft, or its JSON. */
export function DefinitionEditor(props: DefinitionEditorProps) {
  const { definition, analysis, at, isReadOnly, onChange } = props;
  const [view, setView] = useState('drawn');
  const problems = analysis?.problems ?? [];
  const hasForm = definition.kind === 'scheme' && definition.form === 'table';
  return (
    <>
      {hasForm && (
        <p className="viewbar">
          <Options title="Definition" words={VIEWS} value={view} onValue={setView} />
        </p>
      )}
      {hasForm && view === 'drawn' ? (
        <TableEditor
          definition={definition}
          problems={problems}
          model={analysis?.sketch ?? null}
          rule={analysis?.rule ?? []}
          at={at}
          isReadOnly={isReadOnly}
          onChange={onChange}
        />
      ) : (
        <JsonEditor definition={definition} isReadOnly={isReadOnly} onChange={onChange} />
      )}
    </>
  );
}
