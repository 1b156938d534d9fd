import type { ReactNode } from 'react';
import type { CatalogGroup } from '@/lib/entries/catalog-groups';
import type { Sorting } from '@/lib/entries/catalog-sorting';
import { EntryRow } from './entry-row';

interface LineListProps {
  groups: readonly CatalogGroup[];
  /** The equation and its numbers, set on the server, by group. */
  formulas: Readonly<Record<string, ReactNode>>;
  sorting: Sorting;
  onSort: (sorting: Sorting) => void;
  chosen: string | null;
  onChoose: (slug: string) => void;
}

function SortHead({
  by,
  current,
  onSort,
  children,
}: {
  by: Sorting;
  current: Sorting;
  onSort: (by: Sorting) => void;
  children: ReactNode;
}) {
  return (
    <span>
      <button type="button" aria-pressed={by === current} onClick={() => onSort(by)}>
        <span className="sr">Sort by </span>
        {children}
      </button>
    </span>
  );
}

/** The lines of the catalog, by group, under one head. */
export function LineList({ groups, formulas, sorting, onSort, chosen, onChoose }: LineListProps) {
  const head = { current: sorting, onSort };
  return (
    <>
      <div className="line hd">
        <SortHead by="number" {...head}>
          Line and state
        </SortHead>
        <span>Sketch</span>
        <span>Scheme</span>
        <SortHead by="order" {...head}>
          Order
          <br />
          t, x
        </SortHead>
        <SortHead by="bound" {...head}>
          Bound,
          <br />
          staff 0 to 2
        </SortHead>
        <span className="keyl">
          <i className="k1" />
          damping
          <br />
          <i className="k2" />
          phase speed
        </span>
        <SortHead by="arrays" {...head}>
          Arrays,
          <br />
          halo
        </SortHead>
        <SortHead by="flops" {...head}>
          Flops, B<br />a point
        </SortHead>
      </div>
      {groups.map((group) => (
        <section key={group.key} aria-label={group.name}>
          <div className="grp">
            <h2>{group.name}</h2>
            {formulas[group.key]}
          </div>
          {group.lines.map((line) => (
            <EntryRow key={line.slug} line={line} chosen={line.slug === chosen} onChoose={onChoose} />
          ))}
        </section>
      ))}
    </>
  );
}
