/** Findings about the builds themselves: warnings, and what the checks at run time report. */
import { BUILD_FLAGS } from '@/lib/codegen/compile-flags';
import { outcomeOf } from './check';
import type { ScriptReport } from './language-script';
import type { FindingName, FindingView, TrialLanguage } from './trial';

const PER_LANGUAGE: readonly FindingName[] = [
  'clean-build',
  'exact-step',
  'amplification',
  'refinement',
  'margin',
  'guards',
  'pace',
];

/** Where a language is missing, nothing about it is known, and the page says so for each finding. */
export const absentFindings = (language: TrialLanguage, reason: string): FindingView[] =>
  PER_LANGUAGE.map((name) => ({
    name,
    language,
    outcome: 'not-run',
    measured: 'not run',
    target: '—',
    how: `This language could not be tried on this machine: ${reason}.`,
    data: null,
  }));

const WARNING = /\bwarning:|\bWarning:|\berror:.*\[-Werror|\bError:.*\[-Werror|Warning: /g;

export const buildFlagsText = (language: TrialLanguage) => {
  const { compiler, release } = BUILD_FLAGS[language];
  return [compiler, ...release].join(' ');
};

export function cleanBuildFinding(language: TrialLanguage, { build, log }: ScriptReport): FindingView {
  const count = log.match(WARNING)?.length ?? 0;
  const warned = count === 1 ? '1 warning' : `${count || 'some'} warnings`;
  const measured = build === 'clean' ? '0 warnings' : build === 'warnings' ? warned : 'does not compile';
  const { warnings } = BUILD_FLAGS[language];
  return {
    name: 'clean-build',
    language,
    outcome: outcomeOf(build === 'clean'),
    measured,
    target: '0 warnings',
    how:
      language === 'python'
        ? 'The module compiled with every warning as an error.'
        : `The kernel alone, compiled with ${warnings.join(' ')}.`,
    data: { flags: [...BUILD_FLAGS[language].release, ...warnings], log },
  };
}

const CHECKS: Readonly<Record<TrialLanguage, string>> = {
  c: 'the address and undefined-behaviour sanitizers',
  fortran: 'all run-time checks of the compiler',
  python: 'warnings as errors and every floating-point exception raised',
};

export interface GuardReport extends ScriptReport {
  readonly fault: string | null;
  readonly report: string;
  readonly flags: string;
  readonly refused: readonly string[];
}

export function guardsFinding(language: TrialLanguage, run: GuardReport): FindingView {
  const clean = run.fault === null && run.report === '' && run.refused.length === 0;
  // The line that names the fault stands among addresses and frames.
  const telling =
    run.report.split('\n').find((line) => /ERROR:|runtime error|Error/.test(line)) ??
    run.fault ??
    run.refused.join(', ');
  return {
    name: 'guards',
    language,
    outcome: outcomeOf(clean),
    measured: clean ? 'no report' : (telling || run.report).trim().slice(0, 160),
    target: 'no report',
    how: `Every routine called on short arrays, at the smallest size among them, with ${CHECKS[language]}.`,
    data: { flags: run.flags, report: run.report, refused: run.refused },
  };
}
