import 'server-only';
import { GENERATOR_RELEASE, generateKernel } from '@/lib/codegen/generate-kernel';
import { generateDriver } from '@/lib/codegen/generate-driver';
import { KernelOptions, type KernelInput } from '@/lib/codegen/kernel-request';
import { Refusal } from '@/lib/refusal';
import { judgeAgreement } from './agreement-check';
import { absentFindings, buildFlagsText, cleanBuildFinding, guardsFinding } from './build-findings';
import { judgeCheck, type Answers } from './check';
import { runGuards, runLanguage, type LanguageSources } from './run-language';
import { TRIAL_LANGUAGES, type FindingView, type TrialLanguage, type TrialView } from './trial';
import { planTrial, type TrialPlan } from './trial-plan';
import { trialSubject } from './trial-subject';

export interface TrialResult {
  state: 'passed' | 'failed' | 'refused';
  note: string | null;
  findings: FindingView[];
  toolchain: TrialView['toolchain'];
  generatorRelease: string;
}

export interface TrialHooks {
  signal?: AbortSignal;
  onProgress?: (progress: TrialView['progress']) => Promise<void>;
  /** Findings of one language, or those about all, as soon as they are known. */
  onFindings?: (findings: FindingView[]) => Promise<void>;
  /** Changes the texts before they are compiled; for tests of flawed kernels. */
  sourcesOf?: (language: TrialLanguage, sources: LanguageSources) => LanguageSources;
}

const NAMES: Readonly<Record<TrialLanguage, string>> = { c: 'C', fortran: 'Fortran', python: 'Python' };
const OPTIONS = KernelOptions.parse({});
/** Two boxes for each language, and the comparison at the end. */
const STEPS = 2 * TRIAL_LANGUAGES.length + 1;

function sourcesFor(input: KernelInput, language: TrialLanguage): LanguageSources | string {
  const answer = generateKernel(input, language, OPTIONS);
  return answer.kind === 'none'
    ? answer.reason
    : { kernel: answer.kernel, driver: generateDriver(input, language, OPTIONS) };
}

const refused = (note: string): TrialResult => ({
  state: 'refused',
  note,
  findings: [],
  toolchain: [],
  generatorRelease: GENERATOR_RELEASE,
});

interface LanguageOutcome {
  findings: FindingView[];
  /** null where the language is missing here. */
  answers: Answers | null;
  version: string | null;
}

async function tryLanguage(
  language: TrialLanguage,
  sources: LanguageSources,
  plan: TrialPlan,
  signal: AbortSignal | undefined,
  tell: (label: string) => Promise<void>,
): Promise<LanguageOutcome> {
  await tell(`${NAMES[language]}, built and marched`);
  const run = await runLanguage(language, sources, plan, signal);
  if (run.absent !== null) {
    await tell(`${NAMES[language]}, missing here`);
    return { findings: absentFindings(language, run.absent), answers: null, version: null };
  }
  await tell(`${NAMES[language]}, with run-time checks`);
  const guards = await runGuards(language, sources, plan, signal);
  const judged = plan.checks.map((check) => judgeCheck(check, run.answersById, language, run.fault));
  return {
    findings: [cleanBuildFinding(language, run), ...judged, guardsFinding(language, guards)],
    answers: run.answersById,
    version: run.version,
  };
}

function endOf(
  findings: readonly FindingView[],
  missing: readonly TrialLanguage[],
): Pick<TrialResult, 'state' | 'note'> {
  if (missing.length > 0) {
    const names = missing.map((language) => NAMES[language]).join(' and ');
    return { state: 'failed', note: `This revision cannot be vetted: ${names} was not run here.` };
  }
  const failed = new Set(findings.filter(({ outcome }) => outcome === 'failed').map(({ name }) => name));
  return failed.size > 0 ? { state: 'failed', note: null } : { state: 'passed', note: null };
}

/**
 * Compiles and runs the kernels of one revision in every language, and draws the findings from what they printed.
 * Nothing is stored here.
 * @returns state `refused` with a sentence where there is no kernel to try or no sandbox to try it in
 * @throws the signal's reason, where it was aborted
 */
export async function runTrial(input: KernelInput, hooks: TrialHooks = {}): Promise<TrialResult> {
  const { signal, onProgress, onFindings, sourcesOf } = hooks;
  const printed = TRIAL_LANGUAGES.map((language) => ({ language, sources: sourcesFor(input, language) }));
  for (const { sources } of printed) if (typeof sources === 'string') return refused(sources);
  const about = trialSubject(input.definition, input.facts);
  if (about.kind === 'none') return refused(about.reason);

  const plan = planTrial(about.subject);
  const findings: FindingView[] = [];
  const toolchain: TrialView['toolchain'] = [];
  const answers: Partial<Record<TrialLanguage, Answers>> = {};
  let done = 0;
  const tell = async (label: string) => onProgress?.({ done: done++, total: STEPS, label });
  const add = async (found: FindingView[]) => {
    findings.push(...found);
    await onFindings?.(found);
  };
  try {
    for (const { language, sources } of printed) {
      if (typeof sources === 'string') continue;
      const used = sourcesOf?.(language, sources) ?? sources;
      const outcome = await tryLanguage(language, used, plan, signal, tell);
      if (outcome.answers) answers[language] = outcome.answers;
      if (outcome.version) toolchain.push({ language, version: outcome.version, flags: buildFlagsText(language) });
      await add(outcome.findings);
    }
  } catch (fault) {
    if (fault instanceof Refusal) return refused(fault.message);
    throw fault;
  }
  await tell('the three languages compared');
  await add([judgeAgreement(plan.agreement, answers)]);
  const missing = TRIAL_LANGUAGES.filter((language) => !answers[language]);
  return { ...endOf(findings, missing), findings, toolchain, generatorRelease: GENERATOR_RELEASE };
}
