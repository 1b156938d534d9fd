/** The groups of the catalog: one per equation, then the stencils and the time methods. */
import { CONVENTIONS, type Equation } from '@/lib/numerics/equation';
import { EQUATION_NAMES } from './catalog-conditions';
import type { CatalogLine } from './entry';

export interface CatalogGroup {
  readonly key: string;
  readonly name: string;
  readonly equation: Equation | null;
  readonly lines: readonly CatalogLine[];
}

const RANKS = [...Object.keys(CONVENTIONS), 'stencil', 'time-method'];
const groupKey = (line: CatalogLine) => line.equation ?? line.kind;
const NAMES: Readonly<Record<string, string>> = {
  ...EQUATION_NAMES,
  stencil: 'Stencils',
  'time-method': 'Time methods',
  scheme: 'Schemes',
};

/**
 * Lines by group, each group in the order in which its lines come.
 * @param ranked true where the lines come best first (a search): groups then follow their first line
 */
export function groupLines(lines: readonly CatalogLine[], ranked: boolean): CatalogGroup[] {
  const groups = new Map<string, CatalogLine[]>();
  for (const line of lines) {
    const key = groupKey(line);
    const group = groups.get(key);
    if (group) group.push(line);
    else groups.set(key, [line]);
  }
  const keys = [...groups.keys()];
  if (!ranked) keys.sort((a, b) => RANKS.indexOf(a) - RANKS.indexOf(b));
  return keys.map((key) => {
    const members = groups.get(key) ?? [];
    return { key, name: NAMES[key] ?? key, equation: members[0]?.equation ?? null, lines: members };
  });
}
