/** The shell scripts that build and run one language in a box, and how their output is read. */
import { BUILD_FLAGS } from '@/lib/codegen/compile-flags';
import type { TrialLanguage } from './trial';

export interface LanguageFiles {
  readonly kernel: string;
  readonly driver: string;
}

export const TASKS_FILE = 'tasks';
/** Printed when the first tasks are answered and the rest may be sent. */
export const MORE_MARKER = '@@more';

const PYTHON = '/usr/bin/python3';
/** Tells the versions before the driver runs; where NumPy is missing, the language is. */
const PYTHON_RUN = 'run.py';
const PYTHON_RUN_TEXT = `import platform
import runpy
import sys

try:
    import numpy
except ImportError:
    print("@@absent NumPy is not installed")
    sys.exit(0)
print("@@version Python", platform.python_version() + ", NumPy", numpy.__version__)
print("@@answers", flush=True)
if sys.argv[1] == "checked":
    numpy.seterr(all="raise")
    # The driver switches these checks off for marches that overflow; here nothing may.
    numpy.seterr = lambda **_: {}
sys.argv = sys.argv[2:]
runpy.run_path(sys.argv[0], run_name="__main__")
`;
const PYTHON_COMPILE = `import sys; compile(open(sys.argv[1]).read(), sys.argv[1], "exec")`;

/** Further files that the scripts of a language need. */
export const scriptFiles = (language: TrialLanguage): Record<string, string> =>
  language === 'python' ? { [PYTHON_RUN]: PYTHON_RUN_TEXT } : {};

function runAll(program: string, followUp: boolean, marker: string): string[] {
  return [
    ...(marker ? [`echo '${marker}'`] : []),
    `${program} ${TASKS_FILE}; status=$?; printf '\n@@exit %s\n' $status`,
    ...(followUp
      ? [
          `echo '${MORE_MARKER}'; cat > more`,
          ...(marker ? [`echo '${marker}'`] : []),
          `${program} more; status=$?; printf '\n@@exit %s\n' $status`,
        ]
      : []),
  ];
}

/** Builds the kernel alone with warnings as errors; where that fails, without, so that the rest can be measured. */
function compiledScript(language: 'c' | 'fortran', files: LanguageFiles, checked: boolean, followUp: boolean): string {
  const { compiler, release, warnings, checked: checks, libraries } = BUILD_FLAGS[language];
  const flags = (checked ? checks : release).join(' ');
  const kernel = `${compiler} ${flags} -c -o kernel.o ${files.kernel}`;
  return [
    `command -v ${compiler} >/dev/null 2>&1 || { echo '@@absent ${compiler} is not installed'; exit 0; }`,
    `echo "@@version $(${compiler} --version | head -n 1)"`,
    ...(checked
      ? [`${kernel} >build.log 2>&1 && echo '@@build clean' || echo '@@build broken'`]
      : [
          `if ${kernel} ${warnings.join(' ')} >build.log 2>&1; then echo '@@build clean'`,
          `elif ${kernel} -w >second.log 2>&1; then echo '@@build warnings'`,
          `else echo '@@build broken'; fi`,
        ]),
    `[ -f kernel.o ] && { ${compiler} ${flags} -w -o trial kernel.o ${files.driver} ${libraries.join(' ')} >>build.log 2>&1 || echo '@@build broken'; }`,
    `head -c 4000 build.log | sed 's/^/@@log /'`,
    `[ -x trial ] || exit 0`,
    ...runAll('./trial', followUp, '@@answers'),
  ].join('\n');
}

function pythonScript(files: LanguageFiles, checked: boolean, followUp: boolean): string {
  const { release, warnings, checked: checks } = BUILD_FLAGS.python;
  const flags = [...release, ...(checked ? [...checks, ...warnings] : [])].join(' ');
  const mode = checked ? 'checked' : 'plain';
  return [
    `[ -x ${PYTHON} ] || { echo '@@absent ${PYTHON} is not installed'; exit 0; }`,
    `if ${PYTHON} ${[...release, ...warnings].join(' ')} -c '${PYTHON_COMPILE}' ${files.kernel} >build.log 2>&1; then echo '@@build clean'`,
    `elif ${PYTHON} ${release.join(' ')} -c '${PYTHON_COMPILE}' ${files.kernel} >second.log 2>&1; then echo '@@build warnings'`,
    `else echo '@@build broken'; fi`,
    `head -c 4000 build.log | sed 's/^/@@log /'`,
    ...runAll(`${PYTHON} ${flags} ${PYTHON_RUN} ${mode} ${files.driver}`, followUp, ''),
  ].join('\n');
}

/**
 * @param checked  with the checks at run time in place of the release flags
 * @param followUp whether more tasks come through standard input after MORE_MARKER
 */
export const languageScript = (
  language: TrialLanguage,
  files: LanguageFiles,
  { checked, followUp }: { checked: boolean; followUp: boolean },
): string =>
  language === 'python' ? pythonScript(files, checked, followUp) : compiledScript(language, files, checked, followUp);

export interface ScriptReport {
  /** Why the language is missing here; null where it is there. */
  readonly absent: string | null;
  readonly version: string | null;
  readonly build: 'clean' | 'warnings' | 'broken' | null;
  readonly log: string;
  /** What the driver printed, all its runs together. */
  readonly answers: string;
  /** Status with which a run of the driver ended, where it was not 0. */
  readonly crashed: number | null;
}

export function readScript(output: string): ScriptReport {
  const log: string[] = [];
  const answers: string[] = [];
  let absent: string | null = null;
  let version: string | null = null;
  let build: ScriptReport['build'] = null;
  let crashed: number | null = null;
  for (const line of output.split('\n')) {
    const [, word, rest = ''] = /^@@(\w+) ?(.*)$/.exec(line) ?? [];
    if (word === undefined) answers.push(line);
    else if (word === 'absent') absent = rest;
    else if (word === 'version') version ??= rest;
    else if (word === 'log') log.push(rest);
    else if (word === 'build' && (rest === 'clean' || rest === 'warnings' || rest === 'broken')) build = rest;
    else if (word === 'exit' && rest !== '0') crashed ??= Number(rest);
  }
  return { absent, version, build, log: log.join('\n'), answers: answers.join('\n'), crashed };
}
