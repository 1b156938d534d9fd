import type { CatalogLine } from '@/lib/entries/entry';
import { REVISION_STATES } from '@/lib/entries/revision-state';
import { STATE_WORDS } from '@/components/marks/vial';

/** Closes the list: the parts added up to the count shown, then the conventions of the figures. */
export function PageCheck({ lines }: { lines: readonly CatalogLine[] }) {
  const parts = REVISION_STATES.map((state) => ({ state, count: lines.filter((line) => line.state === state).length }));
  return (
    <div className="check">
      <span>Page check</span>
      <span>
        {parts
          .filter(({ count }) => count > 0)
          .map(({ state, count }) => `${count} ${STATE_WORDS[state].toLowerCase()}`)
          .join(' + ')}{' '}
        = <b>{lines.length}</b>
      </span>
      <span className="conv">
        Bytes: real64, a store that misses counts twice. Curves at ¾ of the bound; where there is none, at ¾.
      </span>
    </div>
  );
}
