import Link from 'next/link';
import { memo } from 'react';
import { SmallSketch } from '@/components/marks/small-sketch';
import { Spark } from '@/components/marks/spark';
import { StaffGauge } from '@/components/marks/staff-gauge';
import { STATE_WORDS, Vial } from '@/components/marks/vial';
import { MathText } from '@/components/math/math-text';
import type { CatalogLine } from '@/lib/entries/entry';
import { boundRuns } from '@/lib/facts/reading-texts';

const GONE = ['superseded', 'withdrawn'];

/** Order in time and space, or the one order that a stencil or a time method has. */
function Orders({ line: { summary } }: { line: CatalogLine }) {
  const orders = [summary.orderTime, summary.orderSpace].filter((order) => order !== null);
  return (
    <div className="od">
      <span className="mo omo">order</span>
      {orders.length === 0 ? '–' : orders.map((order, k) => (k === 0 ? order : [<i key="comma">,</i>, order]))}
    </div>
  );
}

interface EntryRowProps {
  line: CatalogLine;
  chosen: boolean;
  onChoose: (slug: string) => void;
}

/** One line of the catalog; all of it is one link. */
export const EntryRow = memo(function EntryRow({ line, chosen, onChoose }: EntryRowProps) {
  const { summary } = line;
  return (
    <Link
      id={`line-${line.slug}`}
      className={`line entry${chosen ? ' sel' : ''}${GONE.includes(line.state) ? ' out' : ''}`}
      href={`/sheets/${line.slug}`}
      prefetch={false}
      onFocus={() => onChoose(line.slug)}
    >
      <div>
        <div className="no">{line.callNumber}</div>
        <div className="state">
          <Vial state={line.state} small />
          <span className="tiny">{STATE_WORDS[line.state]}</span>
        </div>
      </div>
      <SmallSketch sketch={summary.sketch} />
      <div>
        <div className="nm">{line.title}</div>
        <div className="gi">{line.gist}</div>
      </div>
      <Orders line={line} />
      <div>
        <div className="bd">
          {summary.verdict === 'two-parameter region' && 'a region'}
          {summary.parameter !== null && <MathText runs={boundRuns(summary)} />}
        </div>
        <StaffGauge summary={summary} />
      </div>
      <Spark curves={summary.curves} />
      <div className="kps">
        <div className="kp">
          {summary.arrays === null ? (
            <span className="only-d">–</span>
          ) : (
            <>
              {summary.arrays}
              <span className="mo"> {summary.arrays === 1 ? 'array' : 'arrays'} · </span>
            </>
          )}
          {summary.halo && <small>halo {summary.halo.join(' | ')}</small>}
        </div>
        <span className="mo"> · </span>
        <div className="kp">
          {summary.operations === null ? (
            <span className="only-d">–</span>
          ) : (
            <>
              {summary.operations}
              <span className="mo"> flops · </span>
            </>
          )}
          {summary.bytes !== null && <small>{summary.bytes} B</small>}
        </div>
      </div>
    </Link>
  );
});
