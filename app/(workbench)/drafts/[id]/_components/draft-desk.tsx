'use client';

import { useMemo, useState } from 'react';
import { Waiting } from '@/components/ui/waiting';
import { Options } from '@/components/ui/options';
import { useHydrated } from '@/components/ui/use-hydrated';
import { StateMark } from '@/components/marks/vial';
import { StaffSlider } from '@/components/plots/staff-slider';
import type { BuildingBlock, Draft } from '@/db/queries/drafts';
import type { AttachmentView } from '@/lib/attachments/attachment';
import { EQUATION_NAMES } from '@/lib/entries/catalog-conditions';
import { submissionObstacles } from '@/lib/entries/submission-obstacles';
import { symbolText } from '@/lib/facts/reading-texts';
import type { TrialView } from '@/lib/trials/trial';
import { AttachmentsPart } from './attachments-part';
import { DefinitionEditor } from './definition-editor';
import { DraftTrial } from './draft-trial';
import { KeepingBanner, KeepingLine } from './keeping-line';
import { LiveLeaf } from './live-leaf';
import { NotesPart } from './notes-part';
import { PulsePlot } from './pulse-plot';
import { ReferencesPart } from './references-part';
import { SendPart } from './send-part';
import { useKeptDraft } from './use-kept-draft';
import { useLiveAnalysis } from './use-live-analysis';
import { WordsPart } from './words-part';

export interface DraftDeskProps {
  draft: Draft;
  blocks: readonly BuildingBlock[];
  attachments: readonly AttachmentView[];
  latestTrial: TrialView | null;
  /** Why the viewer cannot change the text; null where they can. */
  obstacle: string | null;
  isAuthor: boolean;
}

/** The table is laid out once the browser can tell what it kept itself. */
export function DraftDesk(props: DraftDeskProps) {
  if (useHydrated()) return <Desk {...props} />;
  return (
    <div className="title">
      <div>
        <h1>{props.draft.content.title}</h1>
        <Waiting>
          <p>The table is being laid out.</p>
        </Waiting>
      </div>
    </div>
  );
}

const PULSE_STEPS = { '12': '12 steps', '48': '48 steps', '480': '480 steps' };
/** What spreads has spread before long; what travels shows its faults late. */
const isSpreading = (equation: Draft['equation']) => equation?.includes('diffusion') === true;

/** Right end of the staff, and where it stands at first. */
function staffOf(limit: number | null): { max: number; start: number } {
  if (limit === null) return { max: 4, start: 1.5 };
  if (limit === 0) return { max: 2, start: 0.75 };
  return { max: Math.max(0.02, Number((limit * 1.25).toPrecision(2))), start: Number((limit * 0.75).toPrecision(2)) };
}

function Desk({ draft, blocks, attachments, latestTrial, obstacle, isAuthor }: DraftDeskProps) {
  const isReadOnly = obstacle !== null;
  const kept = useKeptDraft(draft, isReadOnly);
  const { content, keeping, change } = kept;
  const live = useLiveAnalysis(content.definition);
  const { analysis } = live;
  const numeric = analysis?.numeric ?? null;
  const staff = staffOf(analysis?.limit ?? 0);
  const [moved, setMoved] = useState<number | null>(null);
  const [steps, setSteps] = useState(isSpreading(draft.equation) ? '12' : '480');
  const value = moved ?? staff.start;
  const parameter = numeric?.parameters[0] ?? null;
  const at = useMemo(() => (parameter === null ? null : { symbol: symbolText(parameter), value }), [parameter, value]);
  const obstacles = submissionObstacles(content, analysis?.verdict ?? 'facts');

  return (
    <div className="draft">
      <div className="title">
        <div>
          <div className="call">
            <span>
              {draft.callNumber}, revision {draft.number}
            </span>
            <span>
              {draft.equation ? EQUATION_NAMES[draft.equation] : draft.kind === 'stencil' ? 'Stencil' : 'Time method'}
            </span>
            <span>{isAuthor ? 'yours' : `by ${draft.author}`}</span>
            <KeepingLine keeping={keeping} updatedAt={draft.updatedAt} />
          </div>
          <h1>{content.title || 'Without a title'}</h1>
          <p>
            <StateMark state={draft.state} />
          </p>
        </div>
        <SendPart draftId={draft.id} state={draft.state} isAuthor={isAuthor} obstacles={obstacles} flush={kept.flush} />
      </div>
      {draft.state === 'returned' && draft.stateReason && (
        <div className="banner">
          <p>
            <b>Returned:</b> {draft.stateReason}
          </p>
        </div>
      )}
      {isReadOnly && (
        <div className="banner plain">
          <p>{obstacle}</p>
        </div>
      )}
      {!isReadOnly && <KeepingBanner kept={kept} />}
      <section id="definition" tabIndex={-1} aria-label="Definition and analysis">
        <div className="spread draftspread">
          <div className="left">
            <DefinitionEditor
              definition={content.definition}
              analysis={analysis}
              at={at}
              blocks={blocks}
              notes={content.notes}
              slug={draft.slug}
              isReadOnly={isReadOnly}
              onChange={(definition, more) => change({ definition, ...more })}
            />
            {numeric && at && (
              <>
                <StaffSlider
                  label={
                    <>
                      {numeric.parameters.length > 1 ? 'Common value of ' : 'Value of '}
                      <span className="m">{numeric.parameters.map(symbolText).join(', ')}</span>
                    </>
                  }
                  symbol={at.symbol}
                  value={value}
                  max={Math.max(staff.max, moved ?? 0)}
                  limit={analysis?.limit ?? null}
                  onMove={setMoved}
                />
                <PulsePlot numeric={numeric} parameters={numeric.parameters.map(() => value)} steps={Number(steps)} />
                <p>
                  <Options title="Pulse after" words={PULSE_STEPS} value={steps} onValue={setSteps} />
                </p>
              </>
            )}
          </div>
          <LiveLeaf live={live} at={at} />
        </div>
      </section>
      <DraftPart id="title" name="Words" aside="as the catalog shows it">
        <WordsPart content={content} isReadOnly={isReadOnly} isFirst={draft.number === 1} onChange={change} />
      </DraftPart>
      <DraftPart id="notes" name="Notes and references" aside="one of the two is needed">
        <NotesPart notes={content.notes} isReadOnly={isReadOnly} onChange={(notes) => change({ notes })} />
        <ReferencesPart
          references={content.references}
          isReadOnly={isReadOnly}
          onChange={(references) => change({ references })}
        />
      </DraftPart>
      <DraftPart id="attachments" name="Attachments" aside="they go with this revision">
        <AttachmentsPart draftId={draft.id} attachments={attachments} isReadOnly={isReadOnly} />
      </DraftPart>
      <DraftPart id="trials" name="Trials" aside="before and after submission; the latest counts">
        <DraftTrial draftId={draft.id} latest={latestTrial} flush={kept.flush} />
      </DraftPart>
    </div>
  );
}

const DraftPart = ({
  id,
  name,
  aside,
  children,
}: {
  id: string;
  name: string;
  aside: string;
  children: React.ReactNode;
}) => (
  <section className="sec" id={id} tabIndex={-1} aria-labelledby={`${id}-head`}>
    <header>
      <h2 id={`${id}-head`}>{name}</h2>
      <span className="aside">{aside}</span>
    </header>
    {children}
  </section>
);
