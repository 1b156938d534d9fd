import 'server-only';
import { BUILD_FLAGS } from '@/lib/codegen/compile-flags';
import type { DriverAnswer, DriverTask } from '@/lib/codegen/driver-protocol';
import { formatTasks, parseAnswers } from '@/lib/codegen/driver-text';
import { runCommand, type CommandResult } from '@/lib/sandbox/run-command';
import type { Answers } from './check';
import {
  languageScript,
  MORE_MARKER,
  readScript,
  scriptFiles,
  TASKS_FILE,
  type LanguageFiles,
  type ScriptReport,
} from './language-script';
import type { TrialLanguage } from './trial';
import { firstTasks, followUpTasks, hasFollowUp, type TrialPlan } from './trial-plan';

/** Both texts of one language, as the generator prints them. */
export interface LanguageSources {
  readonly kernel: { readonly fileName: string; readonly source: string };
  readonly driver: { readonly fileName: string; readonly source: string };
}

export interface LanguageRun extends ScriptReport {
  readonly answersById: Answers;
  /** Why the driver did not end well, one sentence; null where it did. */
  readonly fault: string | null;
  readonly ms: number;
}

/** Long for a loaded machine: a trial takes about a second of it where nothing else runs. */
const WALL_MS = 60_000;
const OUTPUT_BYTES = 8 * 2 ** 20;

function readAnswers(text: string, tasks: readonly DriverTask[]): { answers: DriverAnswer[]; fault: string | null } {
  const lengths = new Map(tasks.map(({ id, n }) => [id, n]));
  try {
    return { answers: parseAnswers(text, (id) => lengths.get(id)), fault: null };
  } catch (fault) {
    if (!(fault instanceof RangeError)) throw fault;
    return { answers: [], fault: `its output cannot be read: ${fault.message}` };
  }
}

const lastLine = (text: string) => text.trim().split('\n').at(-1)?.slice(0, 300) ?? '';

function faultOf({ timedOut, truncated, stderr }: CommandResult, report: ScriptReport): string | null {
  if (report.absent !== null) return null;
  if (report.build === 'broken') return 'it does not compile';
  if (timedOut) return `it was stopped after ${WALL_MS / 1000} s`;
  if (truncated) return 'it printed more than the trial reads';
  return report.crashed === null ? null : `it ended with status ${report.crashed}: ${lastLine(stderr)}`;
}

const filesOf = ({ kernel, driver }: LanguageSources): LanguageFiles => ({
  kernel: kernel.fileName,
  driver: driver.fileName,
});
const boxFiles = (language: TrialLanguage, { kernel, driver }: LanguageSources, tasks: readonly DriverTask[]) => ({
  [kernel.fileName]: kernel.source,
  [driver.fileName]: driver.source,
  ...scriptFiles(language),
  [TASKS_FILE]: formatTasks(tasks),
});

/** Builds one language under its recorded flags and lets it carry out all tasks of a trial, in one box. */
export async function runLanguage(
  language: TrialLanguage,
  sources: LanguageSources,
  plan: TrialPlan,
  signal?: AbortSignal,
): Promise<LanguageRun> {
  const tasks = firstTasks(plan);
  const followUp = hasFollowUp(plan);
  let more: DriverTask[] = [];
  const byId = (answers: readonly DriverAnswer[]) => new Map(answers.map((answer) => [answer.id, answer]));
  const result = await runCommand({
    script: languageScript(language, filesOf(sources), { checked: false, followUp }),
    files: boxFiles(language, sources, tasks),
    wallMs: WALL_MS,
    outputBytes: OUTPUT_BYTES,
    signal,
    ...(followUp && {
      dialogue: {
        marker: MORE_MARKER,
        reply: (output) => {
          const { answers } = readAnswers(readScript(output).answers, tasks);
          more = followUpTasks(plan, byId(answers));
          return formatTasks(more);
        },
      },
    }),
  });
  const report = readScript(result.stdout);
  const { answers, fault } = readAnswers(report.answers, [...tasks, ...more]);
  return { ...report, answersById: byId(answers), fault: faultOf(result, report) ?? fault, ms: result.ms };
}

export interface GuardRun extends ScriptReport {
  readonly fault: string | null;
  /** What the checks reported, the first lines. */
  readonly report: string;
  readonly flags: string;
  /** Tasks that were refused, by id; none may be. */
  readonly refused: readonly string[];
}

/** The address sanitizer reserves terabytes of address space; what it really uses is bounded by itself. */
const GUARD_PREFIX =
  'export ASAN_OPTIONS=hard_rss_limit_mb=768:color=never UBSAN_OPTIONS=print_stacktrace=1:color=never\n';
const REPORT_CHARACTERS = 2000;

/** Builds one language with checks at run time and calls every routine on short arrays, in one box. */
export async function runGuards(
  language: TrialLanguage,
  sources: LanguageSources,
  plan: TrialPlan,
  signal?: AbortSignal,
): Promise<GuardRun> {
  const result = await runCommand({
    script: GUARD_PREFIX + languageScript(language, filesOf(sources), { checked: true, followUp: false }),
    files: boxFiles(language, sources, plan.guards),
    wallMs: WALL_MS,
    outputBytes: OUTPUT_BYTES,
    ...(language === 'c' && { limits: { addressSpaceBytes: null } }),
    signal,
  });
  const report = readScript(result.stdout);
  const { answers, fault } = readAnswers(report.answers, plan.guards);
  const answered = new Map(answers.map((answer) => [answer.id, answer]));
  const { checked, release, warnings } = BUILD_FLAGS[language];
  return {
    ...report,
    fault: faultOf(result, report) ?? fault,
    report: result.stderr.trim().slice(0, REPORT_CHARACTERS),
    flags: (language === 'python' ? [...release, ...checked, ...warnings] : checked).join(' '),
    refused: plan.guards.flatMap(({ id }) => {
      const answer = answered.get(id);
      return answer?.kind === 'state' && answer.status !== 0 ? [`${id} (status ${answer.status})`] : [];
    }),
  };
}
