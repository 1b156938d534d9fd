/** The conditions of the catalog: what a reader may ask of a line, and how many lines each answer would leave. */
import type { Equation } from '@/lib/numerics/equation';
import type { CatalogLine } from './entry';
import { REVISION_STATES } from './revision-state';

export const CONDITION_KEYS = [
  'equation',
  'dims',
  'time',
  'space',
  'arrays',
  'halo',
  'coupling',
  'state',
  'kind',
  'stable',
  'damping',
  'levels',
  'language',
] as const;
export type ConditionKey = (typeof CONDITION_KEYS)[number];

/** The answers in force, by condition; an absent key asks nothing. */
export type Conditions = Readonly<Partial<Record<ConditionKey, string>>>;

export interface ConditionOption {
  readonly value: string;
  readonly label: string;
  readonly fits: (line: CatalogLine) => boolean;
}
export interface Condition {
  readonly key: ConditionKey;
  readonly title: string;
  readonly options: readonly ConditionOption[];
}
export type CountedOption = ConditionOption & { readonly count: number; readonly inForce: boolean };
export type CountedCondition = Omit<Condition, 'options'> & { readonly options: readonly CountedOption[] };

export const EQUATION_NAMES: Readonly<Record<Equation, string>> = {
  advection: 'Advection',
  diffusion: 'Diffusion',
  'advection-diffusion': 'Advection–diffusion',
  wave: 'Wave',
  schrodinger: 'Schrödinger',
  airy: 'Airy',
  hyperdiffusion: 'Hyperdiffusion',
  'advection-2d': 'Advection, 2-D',
  'diffusion-2d': 'Diffusion, 2-D',
  'diffusion-3d': 'Diffusion, 3-D',
  'wave-2d': 'Wave, 2-D',
  'wave-3d': 'Wave, 3-D',
};

const atLeast = (wanted: number, reading: number | null) => reading !== null && reading >= wanted;
const atMost = (allowed: number, reading: number | null) => reading !== null && reading <= allowed;

const orders = (reading: (line: CatalogLine) => number | null): ConditionOption[] =>
  [1, 2, 3].map((order) => ({
    value: String(order),
    label: `${order} or more`,
    fits: (line) => atLeast(order, reading(line)),
  }));

const haloReach = ({ summary }: CatalogLine) => (summary.halo ? Math.max(...summary.halo) : null);
const hasVerdict =
  (...verdicts: readonly string[]) =>
  ({ summary }: CatalogLine) =>
    summary.verdict !== null && verdicts.includes(summary.verdict);
const LANGUAGES = [
  ['c', 'C'],
  ['fortran', 'Fortran'],
  ['python', 'Python'],
] as const;

const FIXED: readonly Condition[] = [
  {
    key: 'dims',
    title: 'Dimensions',
    options: [1, 2, 3].map((dims) => ({
      value: String(dims),
      label: String(dims),
      fits: ({ kind, summary }) => kind !== 'time-method' && summary.dims === dims,
    })),
  },
  { key: 'time', title: 'Order in time', options: orders(({ summary }) => summary.orderTime) },
  { key: 'space', title: 'Order in space', options: orders(({ summary }) => summary.orderSpace) },
  {
    key: 'arrays',
    title: 'Arrays kept',
    options: [1, 2, 3].map((arrays) => ({
      value: String(arrays),
      label: arrays === 1 ? '1' : `up to ${arrays}`,
      fits: ({ summary }) => atMost(arrays, summary.arrays),
    })),
  },
  {
    key: 'halo',
    title: 'Halo',
    options: [
      {
        value: 'one-side',
        label: 'one side',
        fits: ({ summary }) => summary.halo !== null && Math.min(...summary.halo) === 0,
      },
      ...[1, 2].map((halo) => ({
        value: String(halo),
        label: `up to ${halo}`,
        fits: (line: CatalogLine) => atMost(halo, haloReach(line)),
      })),
    ],
  },
  {
    key: 'coupling',
    title: 'Coupling',
    options: [
      { value: 'explicit', label: 'explicit', fits: ({ summary }) => summary.explicit },
      { value: 'implicit', label: 'implicit', fits: ({ summary }) => !summary.explicit },
    ],
  },
  {
    key: 'state',
    title: 'State',
    // In the order of the band: those a reader meets first in the first column.
    options: (['vetted', 'in-review', 'draft', 'returned', 'superseded', 'withdrawn'] as const)
      .filter((state) => REVISION_STATES.includes(state))
      .map((value) => ({ value, label: value.replace('-', ' '), fits: ({ state }) => state === value })),
  },
  {
    key: 'kind',
    title: 'Kind',
    options: [
      { value: 'scheme', label: 'scheme', fits: ({ kind }) => kind === 'scheme' },
      { value: 'time-method', label: 'time method', fits: ({ kind }) => kind === 'time-method' },
      { value: 'stencil', label: 'stencil', fits: ({ kind }) => kind === 'stencil' },
    ],
  },
  {
    key: 'stable',
    title: 'Stable',
    options: [
      {
        value: 'bounded',
        label: 'up to a bound',
        fits: hasVerdict('conditionally stable'),
      },
      { value: 'always', label: 'at any step', fits: hasVerdict('unconditionally stable') },
      { value: 'region', label: 'in a region', fits: hasVerdict('two-parameter region') },
      { value: 'weak', label: 'weakly unstable', fits: hasVerdict('weakly unstable for all nonzero values') },
      {
        value: 'never',
        label: 'at no step',
        fits: hasVerdict('unstable for all nonzero values', 'degenerate newest level'),
      },
      { value: 'undecided', label: 'not decided', fits: hasVerdict('not decided within the time budget') },
    ],
  },
  {
    key: 'damping',
    title: 'Damping',
    options: [
      { value: 'none', label: 'not of every wave', fits: ({ summary }) => summary.dissipative === false },
      { value: 'some', label: 'of every wave', fits: ({ summary }) => summary.dissipative === true },
    ],
  },
  {
    key: 'levels',
    title: 'Time levels',
    options: [
      { value: '2', label: '2', fits: ({ summary }) => summary.levels === 2 },
      { value: '3', label: '3', fits: ({ summary }) => summary.levels === 3 },
      { value: '4', label: '4 or more', fits: ({ summary }) => atLeast(4, summary.levels) },
    ],
  },
  {
    key: 'language',
    title: 'Kernel in',
    options: LANGUAGES.map(([value, label]) => ({
      value,
      label,
      fits: ({ languages }) => languages.some((language) => language.toLowerCase() === value),
    })),
  },
];

/** The equation without its dimensions, which are a condition of their own. */
const familyOf = (equation: Equation | null) => equation?.replace(/-[23]d$/, '') ?? null;
const FAMILY_NAMES: Readonly<Record<string, string>> = { ...EQUATION_NAMES, 'advection-diffusion': 'Adv.–diffusion' };

/** The conditions that make sense for these lines: the equations are those that occur. */
export function conditionsOf(lines: readonly CatalogLine[]): Condition[] {
  const present = new Set(lines.map(({ equation }) => familyOf(equation)));
  const families = [...new Set(Object.keys(EQUATION_NAMES).map((equation) => familyOf(equation as Equation)))];
  return [
    {
      key: 'equation',
      title: 'Equation',
      options: families
        .filter((family) => family !== null && present.has(family))
        .map((value) => ({
          value: value ?? '',
          label: FAMILY_NAMES[value ?? ''] ?? '',
          fits: ({ equation }) => familyOf(equation) === value,
        })),
    },
    ...FIXED,
  ];
}

const meets = (line: CatalogLine, conditions: readonly Condition[], asked: Conditions, except?: ConditionKey) =>
  conditions.every(({ key, options }) => {
    const value = asked[key];
    if (value === undefined || key === except) return true;
    return options.find((option) => option.value === value)?.fits(line) ?? true;
  });

/** Lines that meet every condition in force. An answer the condition does not know asks nothing. */
export const linesMeeting = (lines: readonly CatalogLine[], conditions: readonly Condition[], asked: Conditions) =>
  lines.filter((line) => meets(line, conditions, asked));

/** Each option with the number of lines it would leave beside the other conditions in force. */
export function countOptions(
  lines: readonly CatalogLine[],
  conditions: readonly Condition[],
  asked: Conditions,
): CountedCondition[] {
  return conditions.map((condition) => {
    const others = lines.filter((line) => meets(line, conditions, asked, condition.key));
    return {
      ...condition,
      options: condition.options.map((option) => ({
        ...option,
        count: others.filter(option.fits).length,
        inForce: asked[condition.key] === option.value,
      })),
    };
  });
}

/** The condition whose release brings most lines, where no line is left; null where no single one helps. */
export function conditionToLetGo(
  lines: readonly CatalogLine[],
  conditions: readonly Condition[],
  asked: Conditions,
): { condition: Condition; option: ConditionOption; count: number } | null {
  const candidates = conditions.flatMap((condition) => {
    const option = condition.options.find(({ value }) => value === asked[condition.key]);
    if (!option) return [];
    return [{ condition, option, count: lines.filter((line) => meets(line, conditions, asked, condition.key)).length }];
  });
  const best = candidates.reduce<(typeof candidates)[number] | null>(
    (kept, one) => (one.count > (kept?.count ?? 0) ? one : kept),
    null,
  );
  return best;
}

/** Conditions from the address bar; unknown keys are left out. */
export const readConditions = (text: (key: string) => string | null): Conditions =>
  Object.fromEntries(CONDITION_KEYS.flatMap((key) => (text(key) ? [[key, text(key)]] : []))) as Conditions;
