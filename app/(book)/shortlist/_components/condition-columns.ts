/** The conditions as columns: what each asks for, and what an entry has. */
import type { Requirement } from '@/lib/shortlist/requirement';
import { type Condition, type Placed } from '@/lib/shortlist/shortlist';
import { holdsBothSigns } from '@/lib/shortlist/candidate';
import { STATE_WORDS } from '@/components/marks/vial';

export interface ConditionColumn {
  readonly condition: Condition;
  readonly head: string;
  readonly asked: string;
  readonly value: (placed: Placed) => string;
}

const upTo = (most: number) => (most === 0 ? 'any' : `up to ${most}`);
const orMore = (least: number) => (least === 0 ? 'any' : `${least} or more`);
export const OFFER_WORDS: Readonly<Record<Requirement['offer'], string>> = {
  vetted: 'vetted',
  'vetted-and-in-review': 'vetted and in review',
  'all-open': 'all open',
};

export function conditionColumns(asked: Requirement): ConditionColumn[] {
  const columns: (ConditionColumn | false)[] = [
    {
      condition: 'orderTime',
      head: 'Order in time',
      asked: orMore(asked.orderAtLeast),
      value: ({ candidate }) => String(candidate.facts.order.pT ?? '–'),
    },
    {
      condition: 'orderSpace',
      head: 'Order in space',
      asked: orMore(asked.orderAtLeast),
      value: ({ candidate }) => String(candidate.facts.order.pX ?? '–'),
    },
    {
      condition: 'arrays',
      head: 'Arrays',
      asked: upTo(asked.arraysAtMost),
      value: ({ candidate }) => String(candidate.facts.storage.arraysInPlace),
    },
    {
      condition: 'halo',
      head: 'Halo',
      asked: upTo(asked.haloAtMost),
      value: ({ candidate }) => (candidate.facts.halo[0] ?? [0, 0]).join(' | '),
    },
    asked.equation === 'advection' && {
      condition: 'bothSigns',
      head: 'Both signs',
      asked: asked.bothSigns === 'yes' ? 'yes' : 'any',
      value: ({ candidate }) => (holdsBothSigns(candidate.facts) ? 'yes' : 'no'),
    },
    {
      condition: 'coupling',
      head: 'Coupling',
      asked: asked.coupling,
      value: ({ candidate }) => (candidate.facts.storage.explicit ? 'explicit' : 'implicit'),
    },
    asked.damping === 'none' && {
      condition: 'damping',
      head: 'Damping',
      asked: 'none',
      value: ({ candidate }) => (candidate.facts.dissipation?.conservative ? 'none' : 'some'),
    },
    asked.language !== 'any' && {
      condition: 'language',
      head: 'Kernel',
      asked: LANGUAGE_WORDS[asked.language],
      value: ({ candidate }) => (candidate.languages.includes(asked.language) ? 'yes' : 'no'),
    },
    {
      condition: 'state',
      head: 'State',
      asked: OFFER_WORDS[asked.offer],
      value: ({ candidate }) => STATE_WORDS[candidate.state].toLowerCase(),
    },
  ];
  return columns.filter((column) => column !== false);
}

export const LANGUAGE_WORDS: Readonly<Record<Requirement['language'], string>> = {
  any: 'any',
  c: 'C',
  fortran: 'Fortran',
  python: 'Python',
};
