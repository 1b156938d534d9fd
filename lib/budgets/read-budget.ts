import 'server-only';
import type { CandidateRow } from '@/db/queries/candidates';
import { CONVENTIONS } from '@/lib/numerics/equation';
import { largestAdmissible } from '@/lib/shortlist/candidate';
import { numericOf } from '@/lib/shortlist/numeric-of';
import { subjectOf } from './other-ways';
import { costOfRun, type Run, spacingFor, type Subject } from './run';
import { readRunQuestion, RUN_FIELDS, type RunQuestion } from './run-question';
import { worstGrowth } from './worst-growth';

/** The scheme that a page without a question starts from. */
const FIRST_EQUATION = 'wave-2d';
/** Part of the bound at which a run marches where nothing else is asked. */
const PART = 0.9;
/** Steps beyond which a run is no longer a run. */
const STEPS_MAX = 1e15;

export interface BudgetQuestion {
  readonly own: CandidateRow;
  /** Schemes of one parameter: those that a run can be budgeted with. */
  readonly offered: readonly CandidateRow[];
  /** Schemes whose diffusion can share the step. */
  readonly partners: readonly CandidateRow[];
  readonly partner: string;
  readonly question: RunQuestion;
  readonly subject: Subject | null;
  readonly run: Run | null;
  readonly parameter: number | null;
  readonly spacing: number | null;
  /** Why there is no answer, where that is not a field's fault. */
  readonly obstacle: string | null;
  /** The whole question as the query of an address, with some of it changed. */
  readonly queryOf: (change?: Readonly<Record<string, string>>) => string;
}

/** @returns null where there is no scheme at all */
export function readBudget(
  rows: readonly CandidateRow[],
  valueOf: (name: string) => string | undefined,
): BudgetQuestion | null {
  const offered = rows.filter(({ facts }) => facts.stability.kind === 'one-parameter');
  const own =
    offered.find(({ slug }) => slug === valueOf('scheme')) ??
    offered.find(({ equation }) => equation === FIRST_EQUATION) ??
    offered[0];
  const numeric = own && numericOf(own);
  if (!own || !numeric) return null;

  const { dims } = CONVENTIONS[own.equation];
  const travels = own.equation.startsWith('advection') || own.equation.startsWith('wave');
  const partners = travels
    ? offered.filter(
        ({ equation, facts }) =>
          equation.startsWith('diffusion') && CONVENTIONS[equation].dims === dims && largestAdmissible(facts) !== null,
      )
    : [];
  const partner = partners.find(({ slug }) => slug === valueOf('partner')) ?? partners[0];
  const asked = readRunQuestion(valueOf, numeric);
  const subject = subjectOf({ numeric, facts: own.facts });
  const { question, parameter } = heldToBound(asked, subject);

  const diffusion =
    question.diffusivity !== null && partner
      ? { diffusivity: question.diffusivity, bound: Math.min(largestAdmissible(partner.facts)!, Number.MAX_VALUE) }
      : null;
  const run: Run | null =
    question.run && Object.keys(question.faults).length === 0 ? { ...question.run, diffusion } : null;
  const spacing =
    run && subject && parameter !== null
      ? (question.spacing ?? spacingFor(run, subject, parameter, question.tolerance))
      : null;
  const tooLong =
    run &&
    subject &&
    parameter !== null &&
    spacing !== null &&
    costOfRun(run, subject, spacing, parameter).steps > STEPS_MAX;
  const unknown = valueOf('scheme');

  return {
    own,
    offered,
    partners,
    partner: partner?.slug ?? '',
    question,
    subject,
    run,
    parameter,
    spacing: tooLong ? null : spacing,
    obstacle:
      unknown !== undefined && unknown !== own.slug
        ? `There is no scheme “${unknown.slice(0, 60)}” that a run can be budgeted with; ${own.callNumber} stands in its place.`
        : subject === null
          ? `${own.title} grows at every step: there is no run to budget with it.`
          : tooLong
            ? 'This run would take more than 10¹⁵ steps. Are the units mixed up?'
            : run && spacing === null
              ? `No grid up to four million points a wave holds ${question.texts.error} with ${own.title}. Allow more, go less far, or take a scheme of higher order.`
              : null,
    queryOf: (change = {}) => {
      const query = new URLSearchParams({ scheme: change.scheme ?? own.slug });
      for (const name of RUN_FIELDS) query.set(name, change[name] ?? question.texts[name]);
      if (partner) query.set('partner', partner.slug);
      return query.toString();
    },
  };
}

/** The parameter asked, or nine tenths of the bound; past the bound the field says how the run would grow. */
function heldToBound(
  question: RunQuestion,
  subject: Subject | null,
): { question: RunQuestion; parameter: number | null } {
  if (!subject) return { question, parameter: null };
  const { bound, numeric } = subject;
  const parameter = question.parameter ?? (Number.isFinite(bound) ? bound * PART : 1);
  if (parameter <= bound * (1 + 1e-9)) return { question, parameter };
  const growth = worstGrowth(numeric, parameter);
  const sentence = `Past the bound ${Number(bound.toPrecision(5))}${growth > 1.0005 ? `: the worst wave would grow × ${Number(growth.toPrecision(3))} a step` : ''}. Accepted: up to ${Number(bound.toPrecision(5))}.`;
  return { question: { ...question, faults: { ...question.faults, number: sentence } }, parameter: null };
}
