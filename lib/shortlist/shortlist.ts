/** The answer of the shortlist: what fits, ranked, and what does not, with the condition that fails marked. */
import type { SchemeFacts } from '@/lib/facts/facts';
import type { RevisionState } from '@/lib/entries/revision-state';
import type { NumericScheme } from '@/lib/numerics/numeric-scheme';
import { cheapestRun, holdsBothSigns, largestAdmissible, MEASURES, type RunCost } from './candidate';
import type { Requirement } from './requirement';

export interface Candidate {
  readonly slug: string;
  readonly callNumber: string;
  readonly title: string;
  readonly gist: string;
  readonly state: RevisionState;
  readonly languages: readonly string[];
  readonly facts: SchemeFacts;
  readonly numeric: NumericScheme;
}

export const CONDITIONS = [
  'stable',
  'accuracy',
  'orderTime',
  'orderSpace',
  'arrays',
  'halo',
  'bothSigns',
  'coupling',
  'damping',
  'language',
  'state',
] as const;
export type Condition = (typeof CONDITIONS)[number];

export interface Placed {
  readonly candidate: Candidate;
  /** null where it is stable nowhere, or no grid reaches the tolerance. */
  readonly cost: RunCost | null;
  /** Conditions that it does not meet; empty for what fits. */
  readonly fails: readonly Condition[];
  /** Measure over that of the best that fits; null where there is no cost or nothing fits. */
  readonly relative: number | null;
  readonly reason: string;
}

export interface Shortlist {
  readonly fits: readonly Placed[];
  readonly misses: readonly Placed[];
  /** Where nothing fits: the one condition whose letting go brings most, and what it brings; null otherwise. */
  readonly letGo: { readonly condition: Condition; readonly brings: number; readonly best: string } | null;
}

const OFFERED: Readonly<Record<Requirement['offer'], readonly RevisionState[]>> = {
  vetted: ['vetted'],
  'vetted-and-in-review': ['vetted', 'in-review'],
  'all-open': ['vetted', 'in-review', 'returned', 'draft'],
};

export const CONDITION_NAMES: Readonly<Record<Condition, string>> = {
  stable: 'a stable step',
  accuracy: 'the error asked',
  orderTime: 'the order in time',
  orderSpace: 'the order in space',
  arrays: 'the arrays kept',
  halo: 'the halo',
  bothSigns: 'both signs of the speed',
  coupling: 'explicit coupling',
  damping: 'no damping',
  language: 'the language',
  state: 'the states offered',
};

/** One field asks for both orders: letting one go lets the other go. */
const LET_GO_WITH: Readonly<Partial<Record<Condition, readonly Condition[]>>> = {
  orderTime: ['orderTime', 'orderSpace'],
  orderSpace: ['orderTime', 'orderSpace'],
};

/** What the field of a condition must say for the condition to be let go. */
export const LET_GO_CHANGE: Readonly<Partial<Record<Condition, Partial<Record<keyof Requirement, string>>>>> = {
  orderTime: { orderAtLeast: '0' },
  orderSpace: { orderAtLeast: '0' },
  arrays: { arraysAtMost: '0' },
  halo: { haloAtMost: '0' },
  bothSigns: { bothSigns: 'no' },
  coupling: { coupling: 'any' },
  damping: { damping: 'any' },
  language: { language: 'any' },
  state: { offer: 'all-open' },
};

/** Conditions that no reader may let go. */
const FIRM: readonly Condition[] = ['stable', 'accuracy'];

const widest = (facts: SchemeFacts) => Math.max(0, ...facts.halo.flat());

function failing(candidate: Candidate, cost: RunCost | null, asked: Requirement): Condition[] {
  const { facts } = candidate;
  const stable = largestAdmissible(facts) !== null;
  const signed = asked.equation === 'advection' && asked.bothSigns === 'yes';
  const fails: Record<Condition, boolean> = {
    stable: !stable,
    accuracy: stable && cost === null,
    orderTime: (facts.order.pT ?? 0) < asked.orderAtLeast,
    orderSpace: (facts.order.pX ?? 0) < asked.orderAtLeast,
    arrays: asked.arraysAtMost > 0 && facts.storage.arraysInPlace > asked.arraysAtMost,
    halo: asked.haloAtMost > 0 && widest(facts) > asked.haloAtMost,
    bothSigns: stable && signed && !holdsBothSigns(facts),
    coupling: asked.coupling === 'explicit' && !facts.storage.explicit,
    damping: asked.damping === 'none' && !facts.dissipation?.conservative,
    language: asked.language !== 'any' && !candidate.languages.includes(asked.language),
    state: !OFFERED[asked.offer].includes(candidate.state),
  };
  return CONDITIONS.filter((condition) => fails[condition]);
}

/** "25", "1 234" */
export const pointsText = (points: number) =>
  Math.ceil(points - 1e-6)
    .toLocaleString('en')
    .replace(/,/g, '\u202f');

function reasonFor({ candidate, cost, fails }: Omit<Placed, 'reason' | 'relative'>, asked: Requirement): string {
  const { facts } = candidate;
  if (fails.includes('stable')) {
    if (facts.stability.verdict.startsWith('weakly'))
      return 'Weakly unstable at every step: noise grows slowly, but it grows.';
    if (facts.stability.verdict.startsWith('unstable')) return 'Grows at every step.';
    return facts.stability.intervals.length > 0
      ? 'Stable for the other sign of the speed only.'
      : 'No stable step is known.';
  }
  if (cost === null) return 'No grid up to four million points a wave reaches this error.';
  const needs = `${pointsText(cost.pointsPerWave)} points a wave`;
  if (fails.length > 0) {
    const others = fails.filter((condition) => condition !== 'stable');
    return `Does not meet ${others.map((condition) => CONDITION_NAMES[condition]).join(' and ')}. It would need ${needs}.`;
  }
  const stages = facts.timeMethod?.stages ?? 1;
  const parts = [`Carries the wave on ${pointsText(cost.pointsPerWave)} points`];
  if (stages > 1) parts.push(`each step pays for ${stages} stages and as many halo exchanges`);
  if (facts.startUpSteps > 0)
    parts.push(`needs ${facts.startUpSteps} starting ${facts.startUpSteps === 1 ? 'step' : 'steps'}`);
  if (facts.computationalModes > 0) parts.push('has a second mode');
  if (facts.dissipation?.conservative) parts.push('damps nothing');
  const bound = largestAdmissible(facts);
  if (bound !== null && Number.isFinite(bound) && cost.parameter < bound * asked.fastest * 0.99)
    parts.push('a step shorter than allowed pays, since its error in time rules');
  return `${parts.join('; ')}.`;
}

/** A candidate with the cheapest run it is good for, before it is set against others. */
export interface Measured {
  readonly candidate: Candidate;
  readonly cost: RunCost | null;
}

export const measure = (candidate: Candidate, asked: Requirement): Measured => ({
  candidate,
  cost: cheapestRun(candidate.numeric, candidate.facts, asked),
});

/** Unstable schemes can never be ranked: without a stable step they have no cost. */
export function rank(candidates: readonly Measured[], asked: Requirement): Shortlist {
  const measured = candidates.map((one) => ({ ...one, fails: failing(one.candidate, one.cost, asked) }));
  const sizeBy = MEASURES[asked.rank];
  const sizeOf = (cost: RunCost | null) => (cost === null ? Infinity : sizeBy(cost));
  const ordered = measured.sort(
    (a, b) => sizeOf(a.cost) - sizeOf(b.cost) || a.candidate.callNumber.localeCompare(b.candidate.callNumber),
  );
  const best =
    ordered.find(({ fails }) => fails.length === 0)?.cost ?? ordered.find(({ cost }) => cost !== null)?.cost ?? null;
  const placed = ordered.map((entry): Placed => ({
    ...entry,
    relative: entry.cost && best ? sizeBy(entry.cost) / sizeBy(best) : null,
    reason: reasonFor(entry, asked),
  }));
  const fits = placed.filter(({ fails }) => fails.length === 0);
  return {
    fits,
    misses: placed.filter(({ fails }) => fails.length > 0),
    letGo: fits.length > 0 ? null : letGoOf(placed),
  };
}

function letGoOf(placed: readonly Placed[]): Shortlist['letGo'] {
  const gains = CONDITIONS.filter((condition) => !FIRM.includes(condition)).map((condition) => {
    const brought = placed.filter(({ fails }) =>
      fails.every((one) => LET_GO_WITH[condition]?.includes(one) ?? one === condition),
    );
    return { condition, brings: brought.length, best: brought[0]?.candidate.title ?? '' };
  });
  const most = gains.reduce((a, b) => (b.brings > a.brings ? b : a));
  return most.brings > 0 ? most : null;
}
