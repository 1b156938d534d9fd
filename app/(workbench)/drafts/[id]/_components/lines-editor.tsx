'use client';

import { useId } from 'react';
import type { BuildingBlock } from '@/db/queries/drafts';
import type { LinesScheme, StencilDefinition } from '@/lib/entries/definition';
import type { Problem } from '@/lib/facts/facts';
import { MethodEditor } from './method-editor';
import { StencilEditor } from './stencil-editor';

interface LinesEditorProps {
  definition: LinesScheme;
  blocks: readonly BuildingBlock[];
  problems: readonly Problem[];
  isReadOnly: boolean;
  /** @param taken the entry that a part was taken from, for the notes */
  onChange: (definition: LinesScheme, taken?: string) => void;
}

const nameOf = ({ callNumber, title, revision }: BuildingBlock) => `${callNumber} ${title}, revision ${revision}`;

/** A list of the book's parts; what is chosen is copied into the draft, so that it stands even if the part is revised. */
function FromTheBook({
  label,
  blocks,
  onTake,
}: {
  label: string;
  blocks: readonly BuildingBlock[];
  onTake: (block: BuildingBlock) => void;
}) {
  const id = useId();
  if (blocks.length === 0) return <p className="cap">The book has nothing in force that fits here.</p>;
  return (
    <div className="field">
      <label htmlFor={id}>{label}</label>
      <select
        id={id}
        value=""
        onChange={(event) => {
          const block = blocks.find((one) => nameOf(one) === event.target.value);
          if (block) onTake(block);
        }}
      >
        <option value="">choose …</option>
        {blocks.map((block) => (
          <option key={nameOf(block)}>{nameOf(block)}</option>
        ))}
      </select>
    </div>
  );
}

const fits = (block: BuildingBlock, stencil: StencilDefinition) =>
  block.definition.kind === 'stencil' &&
  block.definition.dims === stencil.dims &&
  (block.definition.derivative ?? null) === (stencil.derivative ?? null);

/** The method of lines: a stencil for each operator of the equation, and a time method. */
export function LinesEditor({ definition, blocks, problems, isReadOnly, onChange }: LinesEditorProps) {
  const methods = blocks.filter((block) => block.definition.kind === 'time-method');
  return (
    <div className="blocks">
      {definition.space.map((stencil, k) => {
        const name = definition.space.length > 1 ? `Operator ${k + 1}: ` : '';
        const set = (next: StencilDefinition, taken?: string) =>
          onChange({ ...definition, space: definition.space.map((old, j) => (j === k ? next : old)) }, taken);
        return (
          <section key={k} aria-label={`${name}stencil`}>
            <div className="leafhd">
              <span>{name}Stencil in space</span>
              <span>derivative {stencil.derivative ?? 'by its operator'}</span>
            </div>
            {!isReadOnly && (
              <FromTheBook
                label={`${name}Take a stencil from the book`}
                blocks={blocks.filter((block) => fits(block, stencil))}
                onTake={(block) => block.definition.kind === 'stencil' && set(block.definition, nameOf(block))}
              />
            )}
            <StencilEditor
              definition={stencil}
              problems={problems.filter(({ pointer }) => pointer.startsWith(`/space/${k}`))}
              found={null}
              name={name}
              isReadOnly={isReadOnly}
              onChange={set}
            />
          </section>
        );
      })}
      <section aria-label="time method">
        <div className="leafhd">
          <span>Time method</span>
          <span>{definition.time.kind}</span>
        </div>
        {!isReadOnly && (
          <FromTheBook
            label="Take a time method from the book"
            blocks={methods}
            onTake={(block) =>
              block.definition.kind === 'time-method' &&
              onChange({ ...definition, time: block.definition.time }, nameOf(block))
            }
          />
        )}
        <MethodEditor
          time={definition.time}
          isReadOnly={isReadOnly}
          onChange={(time) => onChange({ ...definition, time })}
        />
      </section>
    </div>
  );
}
