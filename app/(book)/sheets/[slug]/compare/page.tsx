import type { Metadata, Route } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { cache } from 'react';
import { kernelDifferences } from '@/app/(desk)/reviews/_components/kernel-differences';
import { Section } from '@/app/(desk)/reviews/[revision]/_components/section';
import { DefinitionCorrections } from '@/components/reviews/definition-corrections';
import { FindingCorrections } from '@/components/reviews/finding-corrections';
import { KernelCorrections } from '@/components/reviews/kernel-corrections';
import { ReadingCorrections } from '@/components/reviews/reading-corrections';
import { Corrections, ShowChoice } from '@/components/reviews/show-choice';
import { NamingCorrections, NoteCorrections, ReferenceCorrections } from '@/components/reviews/text-corrections';
import { StateMark } from '@/components/marks/vial';
import { db } from '@/db/client';
import { findSheet } from '@/db/queries/entries';
import { findKernelSubject } from '@/db/queries/kernel-subjects';
import { currentActor } from '@/lib/auth/current-actor';
import { requireActor } from '@/lib/auth/require-actor';
import type { SheetView } from '@/lib/entries/entry';
import { changedParts, revisionDifference } from '@/lib/reviews/difference/revision-difference';
import { PairForm } from './_components/pair-form';

type Props = PageProps<'/sheets/[slug]/compare'>;

/** Number of a revision in the address; undefined where none is given, null where it is none. */
function numberOf(text: string | string[] | undefined): number | null | undefined {
  if (text === undefined) return undefined;
  return typeof text === 'string' && /^[1-9]\d{0,5}$/.test(text) ? Number(text) : null;
}

const readSheet = cache(async (slug: string, revision?: number) => {
  const actor = await currentActor();
  return actor && findSheet(db, actor, slug, revision);
});

/** The two revisions that the address names; by default the one in force, and the one before it. */
async function readPair({ params, searchParams }: Props): Promise<{ from: SheetView; to: SheetView } | null> {
  const { slug } = await params;
  const query = await searchParams;
  const [from, to] = [numberOf(query.from), numberOf(query.to)];
  if (from === null || to === null) return null;
  const after = await readSheet(slug, to);
  if (!after) return null;
  const usual = after.revisions.find(({ number }) => number < after.revision)?.number ?? after.revision;
  const before = await readSheet(slug, from ?? usual);
  return before && { from: before, to: after };
}

export async function generateMetadata(props: Props): Promise<Metadata> {
  const pair = await readPair(props);
  return {
    title: pair ? `${pair.to.callNumber}, revision ${pair.from.revision} against ${pair.to.revision}` : 'Nothing here',
  };
}

/** Any two revisions of an entry held against each other. */
export default async function ComparePage(props: Props) {
  const actor = await requireActor();
  const pair = await readPair(props);
  if (!pair) notFound();
  const { from, to } = pair;
  const [was, now] = await Promise.all(
    [from, to].map(({ slug, revision }) => findKernelSubject(db, actor, slug, revision)),
  );
  const kernels = await kernelDifferences(was?.input ?? null, now?.input ?? null);
  const difference = revisionDifference(from, to);
  const changed = changedParts(difference);

  return (
    <Corrections className="case compare">
      <div className="title">
        <div>
          <div className="call">
            <span>
              <Link href={`/sheets/${to.slug}` as Route}>{to.callNumber}</Link>
            </span>
            <span>
              revision {from.revision} against revision {to.revision}
            </span>
          </div>
          <h1>{to.title}</h1>
          <p className="lead">
            {from.revision === to.revision
              ? 'A revision does not differ from itself.'
              : changed.length === 0
                ? 'The two do not differ in what is written or computed.'
                : `Changed: ${changed.join(', ')}.`}
          </p>
        </div>
        <div className="stamp">
          <StateMark state={to.state} />
        </div>
      </div>
      <PairForm slug={to.slug} from={from.revision} to={to.revision} revisions={to.revisions} />
      <Section id="readings" name="Readings" aside={<ShowChoice />}>
        <ReadingCorrections changes={difference.readings} />
      </Section>
      <Section id="definition" name="Definition">
        <DefinitionCorrections rule={difference.rule} rows={difference.definition} />
      </Section>
      <Section id="kernel" name="Kernel" aside="double precision, periodic">
        <KernelCorrections kernels={kernels} />
      </Section>
      <Section id="trials" name="Trials">
        {difference.findings.length > 0 ? (
          <FindingCorrections changes={difference.findings} from={from.revision} />
        ) : (
          <p className="cap">The latest trials of the two found the same.</p>
        )}
      </Section>
      <Section id="naming" name="Name, notes and references">
        <NamingCorrections naming={difference.naming} />
        <h3 className="lab">Notes</h3>
        <NoteCorrections changes={difference.notes} />
        <h3 className="lab">References</h3>
        <ReferenceCorrections rows={difference.references} />
      </Section>
    </Corrections>
  );
}
