'use client';

import { useState } from 'react';
import { LargeSketch } from '@/components/marks/large-sketch';
import { Options } from '@/components/ui/options';
import type { BuildingBlock } from '@/db/queries/drafts';
import type { Definition } from '@/lib/entries/definition';
import type { DraftContent } from '@/lib/entries/draft-content';
import type { LiveAnalysis } from '@/lib/facts/live-analysis';
import { FileExchange } from './file-exchange';
import { JsonEditor } from './json-editor';
import { LinesEditor } from './lines-editor';
import { MethodEditor } from './method-editor';
import { RuleLines } from './rule-lines';
import { StencilEditor } from './stencil-editor';
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

const VIEWS = { drawn: 'by hand', json: 'as JSON' };

/** A note of what was taken from the book, once for each part. */
const withTaken = (notes: string, taken: string) => {
  const line = `Taken from the book: ${taken}.`;
  return notes.includes(line) ? notes : `${notes.trimEnd()}${notes.trim() === '' ? '' : '\n\n'}${line}\n`;
};

function ByHand({ definition, analysis, at, blocks, notes, isReadOnly, onChange }: DefinitionEditorProps) {
  const problems = analysis?.problems ?? [];
  const rule = analysis?.rule ?? [];
  if (definition.kind === 'stencil')
    return (
      <>
        <RuleLines rule={rule} />
        {analysis?.sketch && <LargeSketch model={analysis.sketch} />}
        <StencilEditor
          definition={definition}
          problems={problems}
          found={analysis?.weights ?? null}
          isReadOnly={isReadOnly}
          onChange={onChange}
        />
      </>
    );
  if (definition.kind === 'time-method')
    return (
      <>
        <RuleLines rule={rule} />
        <MethodEditor
          time={definition.time}
          isReadOnly={isReadOnly}
          onChange={(time) => onChange({ ...definition, time })}
        />
      </>
    );
  if (definition.form === 'lines')
    return (
      <>
        <RuleLines rule={rule} />
        {analysis?.sketch && <LargeSketch model={analysis.sketch} />}
        <LinesEditor
          definition={definition}
          blocks={blocks}
          problems={problems}
          isReadOnly={isReadOnly}
          onChange={(next, taken) => onChange(next, taken === undefined ? {} : { notes: withTaken(notes, taken) })}
        />
      </>
    );
  if (definition.form === 'table')
    return (
      <TableEditor
        definition={definition}
        problems={problems}
        model={analysis?.sketch ?? null}
        rule={rule}
        at={at}
        isReadOnly={isReadOnly}
        onChange={onChange}
      />
    );
  return null;
}

/** The editor that belongs to the kind of the draft, its JSON, and files both ways. */
export function DefinitionEditor(props: DefinitionEditorProps) {
  const { definition, analysis, slug, isReadOnly, onChange } = props;
  const [view, setView] = useState('drawn');
  const hasForm = !(definition.kind === 'scheme' && definition.form === 'system');
  return (
    <>
      {hasForm && (
        <p className="viewbar">
          <Options title="Definition" words={VIEWS} value={view} onValue={setView} />
        </p>
      )}
      {hasForm && view === 'drawn' ? (
        <ByHand {...props} />
      ) : (
        <>
          {analysis?.sketch && <LargeSketch model={analysis.sketch} />}
          <JsonEditor definition={definition} isReadOnly={isReadOnly} onChange={onChange} />
        </>
      )}
      <FileExchange definition={definition} slug={slug} isReadOnly={isReadOnly} onChange={onChange} />
    </>
  );
}
