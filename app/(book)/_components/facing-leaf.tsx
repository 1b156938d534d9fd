'use client';

import Link from 'next/link';
import useSWR from 'swr';
import { LargeSketch } from '@/components/marks/large-sketch';
import { ThetaPlot } from '@/components/plots/theta-plot';
import { CopyButton } from '@/components/ui/copy-button';
import { fetchText } from '@/components/ui/fetch-text';
import type { CatalogLine } from '@/lib/entries/entry';
import { longDate } from '@/lib/entries/dates';
import { STATE_WORDS } from '@/components/marks/vial';
import type { LeafView } from './leaf-view';

const fetchLeaf = async (address: string): Promise<LeafView> => JSON.parse(await fetchText(address)) as LeafView;

const list = (names: readonly string[]) =>
  names.length < 2 ? names.join('') : `${names.slice(0, -1).join(', ')} and ${names.at(-1)}`;

/** The facing leaf: the chosen line drawn, with what it means and what can be done with it. */
export function FacingLeaf({ line }: { line: CatalogLine }) {
  const { data: leaf, error } = useSWR(`/sheets/${line.slug}/leaf`, fetchLeaf, {
    keepPreviousData: false,
    revalidateOnFocus: false,
  });
  return (
    <div className="peek">
      <div className="leafhd top2">
        <span>Sketch of the chosen line</span>
        <span>{line.callNumber}</span>
      </div>
      <h2 className="h">{line.title}</h2>
      {leaf?.formula && <div className="peek-formula" dangerouslySetInnerHTML={{ __html: leaf.formula }} />}
      {leaf?.sketch && <LargeSketch model={leaf.sketch} />}
      {leaf?.plot && (
        <div className="peek-plot">
          <ThetaPlot data={leaf.plot} id="leaf" />
        </div>
      )}
      {error && <p className="cap">The drawing could not be fetched. The sheet may still open.</p>}
      <p className="cap peek-cap">{leaf?.caption ?? line.gist}</p>
      <div className="acts">
        <Link className="btn main" href={`/sheets/${line.slug}`}>
          Open the sheet
        </Link>
        <Link className="btn" href={`/compare?entry=${line.slug}`} prefetch={false}>
          Side by side
        </Link>
        {leaf && 'address' in leaf.kernel && (
          <CopyButton id="copy-chosen" className="btn" textOf={fetchText.bind(null, leaf.kernel.address)}>
            Copy C kernel
          </CopyButton>
        )}
      </div>
      {leaf && 'none' in leaf.kernel && <p className="small q peek-foot">{leaf.kernel.none}</p>}
      <p className="small q peek-foot">
        {line.usedBy.length > 0 && (
          <>
            Used by {list(line.usedBy)}.<br />
          </>
        )}
        {line.vettedAt
          ? `Vetted ${longDate(line.vettedAt)}, revision ${line.revision}.`
          : `${STATE_WORDS[line.state]}, revision ${line.revision}: not vetted.`}
      </p>
    </div>
  );
}
