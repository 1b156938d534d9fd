/** Tasks as a driver reads them, and what it answered. Doubles travel as the 16 hexadecimal digits of their bits. */
import type { DriverAnswer, DriverTask } from './driver-protocol';

const view = new DataView(new ArrayBuffer(8));

/** 16 lower-case hexadecimal digits. */
export function doubleToHex(value: number): string {
  view.setFloat64(0, value);
  return view.getBigUint64(0).toString(16).padStart(16, '0');
}

/** @throws {RangeError} where the text is not 16 hexadecimal digits */
export function hexToDouble(text: string): number {
  if (!/^[0-9a-fA-F]{16}$/.test(text)) throw new RangeError(`hexToDouble: '${text}' is not 16 hexadecimal digits`);
  view.setBigUint64(0, BigInt(`0x${text}`));
  return view.getFloat64(0);
}

const pointLines = (levels: readonly Float64Array[]) => levels.flatMap((level) => Array.from(level, doubleToHex));

function taskLines(task: DriverTask): string[] {
  const size = 'grid' in task && task.grid ? task.grid.join(' ') : task.n;
  const numbers = 'parameters' in task ? task.parameters.map(doubleToHex) : [];
  switch (task.kind) {
    case 'march':
    case 'run':
      return [[task.kind, task.id, size, task.steps, ...numbers].join(' '), ...pointLines(task.levels)];
    case 'start':
      return [['start', task.id, size, ...numbers].join(' '), ...pointLines(task.levels)];
    case 'apply':
      return [['apply', task.id, task.n, doubleToHex(task.spacing)].join(' '), ...pointLines([task.values])];
    case 'pace':
      return [['pace', task.id, size, task.repeats, ...numbers].join(' ')];
  }
}

/** The text of a task file, closed by "end". Ids are single words. */
export function formatTasks(tasks: readonly DriverTask[]): string {
  for (const { id } of tasks) if (!/^\S{1,200}$/.test(id)) throw new RangeError(`formatTasks: '${id}' is not one word`);
  return [...tasks.flatMap(taskLines), 'end', ''].join('\n');
}

/**
 * @param text standard output of a driver
 * @param lengthOf points of one level by id, where levels are to be told apart; without it all points of an answer
 *                 come as one level
 * @throws {RangeError} naming the line that is no answer
 */
export function parseAnswers(text: string, lengthOf?: (id: string) => number | undefined): DriverAnswer[] {
  const lines = text.split('\n');
  const answers: DriverAnswer[] = [];
  let at = 0;
  while (at < lines.length) {
    const words = lines[at]!.trim().split(/\s+/);
    at++;
    if (words[0] === '') continue;
    const [kind, id, first, second] = words;
    if (kind === 'pace' && id && words.length === 4) {
      answers.push({ kind, id, secondsPerPoint: Number(first), triadBytesPerSecond: Number(second) });
    } else if (kind === 'state' && id && words.length === 3 && /^-?\d+$/.test(first!)) {
      const values: number[] = [];
      while (/^[0-9a-fA-F]{16}$/.test(lines[at]?.trim() ?? '')) values.push(hexToDouble(lines[at++]!.trim()));
      answers.push({ kind, id, status: Number(first), levels: levelsOf(values, lengthOf?.(id)) });
    } else throw new RangeError(`parseAnswers: line ${at} is no answer: '${lines[at - 1]!.slice(0, 60)}'`);
  }
  return answers;
}

function levelsOf(values: readonly number[], length: number | undefined): Float64Array[] {
  if (values.length === 0) return [];
  const each = length && length > 0 ? length : values.length;
  if (values.length % each !== 0)
    throw new RangeError(`parseAnswers: ${values.length} points are not whole levels of ${each}`);
  return Array.from({ length: values.length / each }, (_, k) =>
    Float64Array.from(values.slice(k * each, (k + 1) * each)),
  );
}
