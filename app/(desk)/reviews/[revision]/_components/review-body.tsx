import Link from 'next/link';
import type { Route } from 'next';
import { StateMark } from '@/components/marks/vial';
import { DefinitionCorrections } from '@/components/reviews/definition-corrections';
import { FindingCorrections } from '@/components/reviews/finding-corrections';
import { textNow, numberOf } from '@/components/reviews/kernel-difference';
import { KernelCorrections } from '@/components/reviews/kernel-corrections';
import { PartRemarks, type ShownThread } from '@/components/reviews/part-remarks';
import { ReadingCorrections } from '@/components/reviews/reading-corrections';
import { Corrections, ShowChoice } from '@/components/reviews/show-choice';
import { NamingCorrections, NoteCorrections, ReferenceCorrections } from '@/components/reviews/text-corrections';
import { Thread } from '@/components/reviews/thread';
import { FindingsTable } from '@/components/trials/findings-table';
import { longDate, moment } from '@/lib/entries/dates';
import type { Actor } from '@/lib/people/actor';
import { changedParts, revisionDifference } from '@/lib/reviews/difference/revision-difference';
import { lineNow } from '@/lib/reviews/remark';
import { type RemarkPart, partsToRemarkOn } from '@/lib/reviews/remark-part';
import { bookObstacle } from '@/lib/reviews/review-rules';
import { Queue } from '../../_components/queue';
import { REMARK_ACTIONS } from '../../_components/remark-actions';
import { shownThreads } from '../../_components/shown-threads';
import { DecisionForm } from './decision-form';
import { Evidence } from './evidence';
import { offersOf } from './offers';
import type { Review } from './read-review';
import { Section } from './section';
import { Signatures } from './signatures';

type Props = Review & { actor: Actor };

function Title({ revision, now, was }: Props) {
  const since = revision.submittedAt ?? revision.stateSince;
  const sentence = revision.changeNote.trim() || now.gist;
  return (
    <div className="title">
      <div>
        <div className="call">
          <span>
            <Link href={`/sheets/${now.slug}/${now.revision}` as Route}>
              {now.callNumber}, revision {now.revision}
            </Link>
          </span>
          <span>
            from {now.author}, {longDate(since.toISOString())}
          </span>
        </div>
        <h1>{now.title}</h1>
        {sentence && <p className="lead">“{sentence}”</p>}
        {!was && <p className="cap">The first revision of its entry: there is nothing to hold it against.</p>}
      </div>
      <div className="stamp">
        <StateMark state={now.state} />
      </div>
    </div>
  );
}

function Standing({ review, now, given }: Props) {
  const obstacle = bookObstacle(review);
  const voids = given.filter(({ isVoid }) => isVoid);
  return (
    <>
      {now.state === 'returned' && now.stateReason && (
        <div className="banner" role="note">
          <p>
            <b>Returned to its author.</b> {now.stateReason}
          </p>
        </div>
      )}
      {obstacle && (
        <div className="banner plain" role="note">
          <p>
            <b>Not vetted yet.</b> {obstacle}
          </p>
        </div>
      )}
      {voids.length > 0 && (
        <div className="banner plain" role="note">
          <p>
            <b>Earlier signatures are void.</b> The author has changed the text since{' '}
            {voids.map(({ name }) => name).join(' and ')} signed.
          </p>
        </div>
      )}
    </>
  );
}

/** The review of one revision, from what it changes to the decision on it. */
export function ReviewBody(props: Props) {
  const { actor, revision, review, now, was, given, items, kernels, signaturesNeeded } = props;
  const difference = revisionDifference(was, now);
  const threads = shownThreads(actor, now);
  const parts = partsToRemarkOn(now.kind, now.facts !== null);
  const linesOf = (language: string | null) => {
    const kernel = kernels.find((one) => one.language === language);
    return kernel?.kind === 'kernel' ? kernel.lines.filter((line) => numberOf(line) !== null).map(textNow) : [];
  };
  const isGone = ({ thread }: ShownThread) =>
    thread.line === null
      ? !(parts as readonly string[]).includes(thread.part)
      : lineNow(thread, linesOf(thread.language)) === null;
  const gone = threads.filter(isGone);
  const present = threads.filter((one) => !isGone(one));
  const on = (...names: RemarkPart[]) =>
    present.filter(({ thread }) => thread.line === null && (names as string[]).includes(thread.part));
  const margin = (part: RemarkPart, ...more: RemarkPart[]) => ({
    hasThreads: on(part, ...more).length > 0,
    margin: <PartRemarks revisionId={revision.id} part={part} threads={on(part, ...more)} actions={REMARK_ACTIONS} />,
  });
  const open = threads.filter(({ thread }) => thread.settledAt === null).length;
  const changed = changedParts(difference);
  const signed = given.filter(({ isVoid }) => !isVoid);
  const trial = now.latestTrial;

  return (
    <div className="rev3">
      <Queue
        items={items}
        viewerId={actor.id}
        now={new Date()}
        signaturesNeeded={signaturesNeeded}
        current={revision.id}
      />
      <Corrections className="case">
        <Title {...props} />
        <Standing {...props} />
        <div className="spread half">
          <div className="left">
            <div className="leafhd">
              <span>{was ? `Readings, revision ${was.revision} to ${now.revision}` : 'Readings'}</span>
              {was && <ShowChoice />}
            </div>
            <ReadingCorrections changes={difference.readings} />
            <div className="marginal flat">
              <PartRemarks
                revisionId={revision.id}
                part="readings"
                threads={on('readings', 'bound', 'curves')}
                actions={REMARK_ACTIONS}
              />
            </div>
          </div>
          <Evidence was={was} now={now} />
        </div>
        <Section
          id="definition"
          name="Definition"
          aside={was ? `against revision ${was.revision}: ${changed.join(', ') || 'nothing'} changed` : undefined}
          {...margin('definition')}
        >
          <DefinitionCorrections rule={difference.rule} rows={difference.definition} />
        </Section>
        <Section id="kernel" name="Kernel" aside="double precision, periodic" {...margin('kernel')}>
          <KernelCorrections
            kernels={kernels}
            remarking={{
              revisionId: revision.id,
              threads: present.filter(({ thread }) => thread.line !== null),
              actions: REMARK_ACTIONS,
            }}
          />
        </Section>
        <Section
          id="trials"
          name="Trials"
          aside={trial?.finishedAt ? `run on ${moment(trial.finishedAt)}` : 'not run to its end yet'}
          {...margin('trials')}
        >
          {trial && trial.findings.length > 0 ? (
            <FindingsTable findings={trial.findings} />
          ) : (
            <p className="cap">There are no findings yet.</p>
          )}
          {trial?.note && trial.state !== 'passed' && <p className="errline small">{trial.note}</p>}
          {was && difference.findings.length > 0 && (
            <FindingCorrections changes={difference.findings} from={was.revision} />
          )}
        </Section>
        <Section id="naming" name="Name, notes and references" {...margin('notes', 'naming', 'references')}>
          <NamingCorrections naming={difference.naming} />
          <h3 className="lab">Notes</h3>
          <NoteCorrections changes={difference.notes} />
          <h3 className="lab">References</h3>
          <ReferenceCorrections rows={difference.references} />
        </Section>
        <Section id="remarks" name="Remarks" aside={open === 1 ? '1 open remark' : `${open} open remarks`}>
          {gone.length > 0 && (
            <>
              <h3 className="lab">On what is gone from the present text</h3>
              {gone.map(({ thread, obstacle }) => (
                <div key={thread.id} className="gonethread">
                  {thread.quote !== null && (
                    <code>
                      <del>{thread.quote.trim()}</del>
                    </code>
                  )}
                  <Thread thread={thread} obstacle={obstacle} actions={REMARK_ACTIONS} />
                </div>
              ))}
            </>
          )}
          <PartRemarks revisionId={revision.id} part="sheet" threads={on('sheet')} actions={REMARK_ACTIONS} />
        </Section>
        <Section
          id="decision"
          name="Decision"
          aside={`${signed.length} of ${signaturesNeeded} signatures${signed.length > 0 ? `: ${signed.map(({ name }) => name).join(', ')}` : ''}`}
        >
          <Signatures given={given} />
          <DecisionForm offers={offersOf(actor, props)} signer={actor.name} />
          {review.authorId === actor.id && review.state === 'in-review' && (
            <p className="cap after">You wrote it: others decide. On the drafting table you can take it back.</p>
          )}
        </Section>
      </Corrections>
    </div>
  );
}
