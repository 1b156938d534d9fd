/** Two lists of named values, row against row. */
export interface Row {
  /** What the row is, unique in its list: "u at n + 1, i − 1". */
  readonly place: string;
  readonly value: string;
}

export interface RowChange {
  readonly place: string;
  /** null where the row was not there. */
  readonly was: string | null;
  /** null where the row is gone. */
  readonly now: string | null;
}

export const isChanged = ({ was, now }: RowChange) => was !== now;

/** Every row of either list, in the order of the new one; what is gone stands where it stood. */
export function rowDifference(was: readonly Row[], now: readonly Row[]): RowChange[] {
  const changes: RowChange[] = now.map(({ place, value }) => ({
    place,
    was: was.find((row) => row.place === place)?.value ?? null,
    now: value,
  }));
  for (const [k, { place, value }] of was.entries()) {
    if (now.some((row) => row.place === place)) continue;
    const before = was.slice(0, k).findLast((row) => changes.some((change) => change.place === row.place));
    const at = before ? changes.findIndex((change) => change.place === before.place) + 1 : 0;
    changes.splice(at, 0, { place, was: value, now: null });
  }
  return changes;
}
