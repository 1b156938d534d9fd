import { LargeSketch } from '@/components/marks/large-sketch';
import { Stamp } from '@/components/marks/stamp';
import { StateMark } from '@/components/marks/vial';
import { CopyFile } from '@/components/ui/copy-file';
import { Markdown } from '@/components/ui/markdown';
import type { AttachmentView } from '@/lib/attachments/attachment';
import { longDate } from '@/lib/entries/dates';
import type { SheetView } from '@/lib/entries/entry';
import { type Drawing, drawingOf } from '@/lib/facts/drawing';
import { entryReadings } from '@/lib/facts/entry-readings';
import type { Actor } from '@/lib/people/actor';
import { partsToRemarkOn } from '@/lib/reviews/remark-part';
import { REMARK_ACTIONS } from '@/app/(desk)/reviews/_components/remark-actions';
import { shownThreads } from '@/app/(desk)/reviews/_components/shown-threads';
import { Banners } from './banners';
import { BoundPart } from './bound-part';
import { CurvesPart } from './curves-part';
import { KernelPart } from './kernel-part';
import { observedOrder } from './observed-order';
import { Readings } from './readings';
import { ReferencesPart } from './references-part';
import { RemarksPart } from './remarks-part';
import { RevisionsPart } from './revisions-part';
import { Rod, type SheetPart } from './rod';
import { subtitleOf } from './subtitle';
import type { ShownKernel } from './shown-kernel';
import { TrialsPart } from './trials-part';
import { UsedByPart } from './used-by-part';
import { WavenumberPart } from './wavenumber-part';

interface SheetBodyProps {
  actor: Actor;
  sheet: SheetView;
  kernel: ShownKernel;
  attachments: readonly AttachmentView[];
  origin: string;
}

/** The parts that this kind of entry has, in order; their place is their figure on the rod. */
function partsOf({ facts }: SheetView): readonly SheetPart[] {
  const names: (SheetPart | null)[] = [
    { id: 'readings', name: 'Readings and sketch' },
    facts?.kind === 'scheme' ? { id: 'bound', name: 'Bound' } : null,
    facts?.kind === 'scheme' ? { id: 'curves', name: 'Damping and speed' } : null,
    facts?.kind === 'stencil' ? { id: 'curves', name: 'Resolution' } : null,
    { id: 'kernel', name: 'Kernel' },
    { id: 'trials', name: 'Trials' },
    { id: 'revisions', name: 'Revisions' },
    { id: 'used', name: 'Used by' },
    { id: 'references', name: 'References' },
    { id: 'remarks', name: 'Remarks' },
  ];
  return names.filter((part) => part !== null);
}

function Title({ sheet }: { sheet: SheetView }) {
  return (
    <div className="title">
      <div>
        <div className="call">
          <span>{sheet.callNumber}</span>
          {subtitleOf(sheet).map((text) => (
            <span key={text}>{text}</span>
          ))}
        </div>
        <h1>{sheet.title}</h1>
        <p className="lead">{sheet.gist}</p>
      </div>
      {sheet.state === 'vetted' && sheet.vettedAt ? (
        <Stamp
          revision={sheet.revision}
          date={longDate(sheet.vettedAt)}
          names={sheet.signatures.map(({ name }) => name)}
        />
      ) : (
        <div className="stamp">
          <StateMark state={sheet.state} />
          <p>
            Revision {sheet.revision}, by {sheet.author}
          </p>
        </div>
      )}
    </div>
  );
}

function SketchLeaf({ sheet, drawing, kernel }: { sheet: SheetView; drawing: Drawing; kernel: ShownKernel }) {
  return (
    <div className="right">
      <div className="leafhd">
        <span>Sketch</span>
        <span>the bubble is the point computed</span>
      </div>
      {drawing.sketch ? (
        <LargeSketch model={drawing.sketch} />
      ) : (
        <p className="cap nosketch">
          {sheet.kind === 'time-method'
            ? 'A method for any right side has no points to draw.'
            : 'There is nothing to draw until the definition holds.'}
        </p>
      )}
      <div className="acts leafacts">
        {kernel.kind === 'kernel' && (
          <CopyFile address={kernel.address} className="btn main">
            Copy C kernel
          </CopyFile>
        )}
        <a className="btn" href="#kernel">
          See the kernel
        </a>
        <a className="btn" href={`/compare?entry=${sheet.slug}`}>
          Side by side
        </a>
      </div>
      {sheet.notes && (
        <div className="small leafnotes">
          <Markdown text={sheet.notes} />
        </div>
      )}
    </div>
  );
}

const WARNINGS = {
  draft: 'This revision is a draft. Its kernels are shown for work on it, not for use.',
  'in-review': 'This revision is in review. Its kernels are not vetted.',
  returned: 'This revision was returned. Its kernels are not vetted.',
  vetted: null,
  superseded: 'This revision is superseded. Take the kernel of the one in force.',
  withdrawn: 'This revision is withdrawn. Do not use its kernels in new code.',
} as const satisfies Record<SheetView['state'], string | null>;

/** One revision of an entry, from its readings to what people said of it. */
export function SheetBody({ actor, sheet, kernel, attachments, origin }: SheetBodyProps) {
  const parts = partsOf(sheet);
  const figureOf = (id: string) => parts.findIndex((part) => part.id === id) + 1;
  const drawing = drawingOf(sheet.definition, sheet.facts, sheet.summary);
  const { facts, summary, definition } = sheet;
  const noTrial = kernel.kind === 'none' ? 'Without a kernel there is nothing to compile and run.' : null;

  return (
    <div className="sheet">
      <Rod parts={parts} />
      <div className="pages">
        <Banners sheet={sheet} role={actor.role} />
        <Title sheet={sheet} />
        <section id="readings" tabIndex={-1} aria-label="Readings and sketch">
          <div className="spread keep">
            <Readings
              rule={drawing.rule}
              sheet={sheet}
              readings={entryReadings(facts, summary, observedOrder(sheet.latestTrial))}
            />
            <SketchLeaf sheet={sheet} drawing={drawing} kernel={kernel} />
          </div>
        </section>
        {facts?.kind === 'scheme' && summary && (
          <BoundPart
            figure={figureOf('bound')}
            definition={definition}
            facts={facts}
            summary={summary}
            drawing={drawing}
          />
        )}
        {facts?.kind === 'scheme' && <CurvesPart figure={figureOf('curves')} sheet={sheet} drawing={drawing} />}
        {definition.kind === 'stencil' && facts?.kind === 'stencil' && (
          <WavenumberPart figure={figureOf('curves')} definition={definition} slug={sheet.slug} />
        )}
        <KernelPart
          key={sheet.revisionId}
          figure={figureOf('kernel')}
          source={`/sheets/${sheet.slug}/${sheet.revision}/kernel`}
          first={kernel}
          aside={kernelAside(sheet)}
          warning={WARNINGS[sheet.state]}
          origin={origin}
        />
        <TrialsPart
          key={`trials-${sheet.revisionId}`}
          figure={figureOf('trials')}
          revisionId={sheet.revisionId}
          latest={sheet.latestTrial}
          obstacle={noTrial}
        />
        <RevisionsPart sheet={sheet} figure={figureOf('revisions')} />
        <div className="twoup">
          <UsedByPart sheet={sheet} figure={figureOf('used')} />
          <ReferencesPart sheet={sheet} attachments={attachments} figure={figureOf('references')} />
        </div>
        <RemarksPart
          key={`remarks-${sheet.revisionId}`}
          figure={figureOf('remarks')}
          revisionId={sheet.revisionId}
          parts={partsToRemarkOn(sheet.kind, facts !== null)}
          threads={shownThreads(actor, sheet)}
          actions={REMARK_ACTIONS}
        />
        <p className="cap caution">
          Where results bear on safety (flood levels, structures, exposure), verification and validation under the
          applicable codes and by licensed practice remain with you.
        </p>
      </div>
    </div>
  );
}

function kernelAside({ facts }: SheetView): string {
  if (facts?.kind === 'scheme') {
    const { arraysInPlace } = facts.storage;
    return `one step, ${arraysInPlace} ${arraysInPlace === 1 ? 'array' : 'arrays'}, no allocation`;
  }
  return facts?.kind === 'stencil' ? 'one derivative, no allocation' : '';
}
