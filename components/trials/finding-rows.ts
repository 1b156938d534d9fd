/** Findings as rows of the table: one per finding, languages together where they agree. */
import {
  FINDING_NAMES,
  type FindingName,
  type FindingOutcome,
  type FindingView,
  type TrialLanguage,
} from '@/lib/trials/trial';

export const LANGUAGE_NAMES = { c: 'C', fortran: 'Fortran', python: 'Python' } as const satisfies Record<
  TrialLanguage,
  string
>;

export const FINDING_TITLES = {
  'clean-build': 'Clean build',
  'exact-step': 'Exact step',
  amplification: 'Amplification',
  refinement: 'Observed order',
  margin: 'Stability margin',
  agreement: 'Languages agree',
  guards: 'Guards',
  pace: 'Pace',
} as const satisfies Record<FindingName, string>;

export interface FindingRow {
  readonly name: FindingName;
  readonly title: string;
  /** What was found; `languages` is empty where all found the same, here and below. */
  readonly found: readonly { readonly languages: readonly string[]; readonly text: string }[];
  readonly targets: readonly string[];
  readonly how: readonly { readonly languages: readonly string[]; readonly text: string }[];
  readonly outcome: FindingOutcome;
  /** Languages in which it failed or did not run, where not all did. */
  readonly where: readonly string[];
}

/** The gravest comes first. */
const GRAVITY: readonly FindingOutcome[] = ['failed', 'not-run', 'passed', 'not-applicable'];

const distinct = (texts: readonly string[]) => [...new Set(texts.filter(Boolean))];
const languageName = ({ language }: FindingView) => (language ? LANGUAGE_NAMES[language] : 'all');

/** Distinct texts, each with the languages that gave it; without them where all gave the same. */
function byText(findings: readonly FindingView[], read: (finding: FindingView) => string) {
  const texts = distinct(findings.map(read));
  return texts.map((text) => ({
    text,
    languages: texts.length === 1 ? [] : findings.filter((one) => read(one) === text).map(languageName),
  }));
}

function rowOf(name: FindingName, findings: readonly FindingView[]): FindingRow {
  const outcome = GRAVITY.find((one) => findings.some((finding) => finding.outcome === one)) ?? 'not-applicable';
  const concerned = findings.filter((finding) => finding.outcome === outcome);
  return {
    name,
    title: FINDING_TITLES[name],
    found: byText(findings, ({ measured }) => measured),
    targets: distinct(findings.map((finding) => finding.target)),
    how: byText(concerned, ({ how }) => how),
    outcome,
    where: concerned.length === findings.length ? [] : concerned.map(languageName),
  };
}

export const findingRows = (findings: readonly FindingView[]): FindingRow[] =>
  FINDING_NAMES.flatMap((name) => {
    const own = findings.filter((finding) => finding.name === name);
    return own.length === 0 ? [] : [rowOf(name, own)];
  });
