/**
 * Definitions as files: coefficient table, stencil, tableau and multistep method as CSV, everything as JSON; both ways.
 *
 *   scheme        level,offset,coefficient       (several dimensions: level,offset_i,offset_j,coefficient)
 *   stencil       offset,weight                  (weight empty on every line: the highest order is asked for)
 *   Runge-Kutta   c,a1,…,as   then a last line   b,b1,…,bs
 *   multistep     level,alpha,beta               (newest level last, as level 1)
 */
import { CONVENTIONS } from '@/lib/numerics/equation';
import { csvRows, csvText, type CsvRow } from './csv';
import { type Definition, ExpressionText, LIMITS, RationalText, type TimeMethod } from './definition';

export interface LineError {
  /** 1-based; 0 for the file as a whole. */
  readonly line: number;
  readonly message: string;
}
export type FileOutcome = { readonly definition: Definition } | { readonly errors: readonly LineError[] };

/** More characters than this are not read: the largest definition has a tenth of it. */
export const FILE_CHARACTERS_MAX = 200_000;
const ERRORS_MAX = 30;

const AXES = ['i', 'j', 'k'];
const offsetNames = (dims: number) => (dims === 1 ? ['offset'] : AXES.slice(0, dims).map((axis) => `offset_${axis}`));
const listed = (offset: string | readonly string[]) => (typeof offset === 'string' ? [offset] : [...offset]);
const joined = (offset: string[]) => (offset.length === 1 ? (offset[0] ?? '0') : offset);

function methodCsv(time: TimeMethod): string | null {
  if (time.kind === 'runge-kutta') {
    const stages = time.b.length;
    const c = (row: number) => time.c?.[row] ?? '';
    return csvText([
      ['c', ...Array.from({ length: stages }, (_, k) => `a${k + 1}`)],
      ...time.A.map((row, k) => [c(k), ...Array.from({ length: stages }, (_, j) => row[j] ?? '0')]),
      ['b', ...time.b],
    ]);
  }
  if (time.kind !== 'multistep') return null;
  const oldest = 2 - time.alpha.length;
  return csvText([
    ['level', 'alpha', 'beta'],
    ...time.alpha.map((alpha, k) => [String(oldest + k), alpha, time.beta[k] ?? '0']),
  ]);
}

/** @returns null for kinds that only JSON can carry: lines, systems, implicit-explicit methods, compact stencils */
export function definitionCsv(definition: Definition): string | null {
  if (definition.kind === 'time-method') return methodCsv(definition.time);
  if (definition.kind === 'stencil') {
    if (definition.lhs) return null;
    return csvText([
      [...offsetNames(definition.dims), 'weight'],
      ...definition.offsets.map((offset, k) => [...listed(offset), definition.weights?.[k] ?? '']),
    ]);
  }
  if (definition.form !== 'table') return null;
  return csvText([
    ['level', ...offsetNames(CONVENTIONS[definition.equation].dims), 'coefficient'],
    ...definition.terms.map(({ level, offset, coefficient }) => [level, ...listed(offset), coefficient]),
  ]);
}

type Check = { ok: string } | { error: string };
const rational = (text: string, what: string): Check => {
  const parsed = RationalText.safeParse(text);
  return parsed.success
    ? { ok: parsed.data }
    : { error: `${what} '${text}' cannot be read; accepted: an integer, a fraction such as -1/12, or a decimal` };
};
const expression = (text: string): Check => {
  const parsed = ExpressionText.safeParse(text);
  return parsed.success
    ? { ok: parsed.data }
    : {
        error: `the coefficient ${text === '' ? 'is missing' : 'is too long'}; accepted: 1 to ${LIMITS.expression} characters`,
      };
};

/** Reads rows below a heading that must be there, each field by its own check; every fault is told with its line. */
function readRows(
  rows: readonly CsvRow[],
  heading: readonly string[],
  checks: readonly ((text: string) => Check)[],
): { values: string[][]; errors: LineError[] } {
  const [head, ...body] = rows;
  const errors: LineError[] = [];
  if (!head || head.fields.join().toLowerCase() !== heading.join())
    return {
      values: [],
      errors: [{ line: head?.line ?? 0, message: `the first line must read ${heading.join(',')}` }],
    };
  if (body.length === 0) errors.push({ line: head.line, message: 'nothing stands below the heading' });
  const values = body.flatMap(({ line, fields }) => {
    if (fields.length !== heading.length) {
      errors.push({
        line,
        message: `${fields.length} columns; accepted: ${heading.length}, as in ${heading.join(',')}`,
      });
      return [];
    }
    const read = fields.map((field, k) => checks[k]!(field));
    for (const one of read) if ('error' in one) errors.push({ line, message: one.error });
    return [read.map((one) => ('ok' in one ? one.ok : ''))];
  });
  return { values, errors };
}

const tooMany = (count: number, most: number, what: string): LineError[] =>
  count > most ? [{ line: 0, message: `${count} ${what} are too many; accepted: at most ${most}` }] : [];

function readTableau(rows: readonly CsvRow[]): { time?: TimeMethod; errors: LineError[] } {
  const [head, ...body] = rows;
  const last = body.at(-1);
  const stages = body.length - 1;
  if (!head || !last || last.fields[0]?.toLowerCase() !== 'b' || stages < 1)
    return {
      errors: [
        {
          line: last?.line ?? 0,
          message: 'the last line must be b,b1,…,bs; accepted: a heading c,a1,…,as, a line a stage, then b',
        },
      ],
    };
  const heading = ['c', ...Array.from({ length: stages }, (_, k) => `a${k + 1}`)];
  const isEmptyC = body.slice(0, -1).every(({ fields }) => fields[0] === '');
  const weight = (text: string) => rational(text, 'the number');
  const optional = (text: string): Check => (text === '' ? { ok: '' } : weight(text));
  const { values, errors } = readRows(
    [head, ...body.slice(0, -1), { line: last.line, fields: ['', ...last.fields.slice(1)] }],
    heading,
    [isEmptyC ? optional : (text) => (text === '' ? { ok: '' } : weight(text)), ...heading.slice(1).map(() => weight)],
  );
  errors.push(...tooMany(stages, LIMITS.stages, 'stages'));
  if (errors.length > 0) return { errors };
  const stageRows = values.slice(0, -1);
  return {
    time: {
      kind: 'runge-kutta',
      A: stageRows.map((row) => row.slice(1)),
      b: values.at(-1)!.slice(1),
      ...(isEmptyC ? {} : { c: stageRows.map((row) => row[0] || '0') }),
    },
    errors,
  };
}

function readMethod(rows: readonly CsvRow[]): { time?: TimeMethod; errors: LineError[] } {
  if (rows[0]?.fields[0]?.toLowerCase() !== 'level') return readTableau(rows);
  const number = (text: string) => rational(text, 'the number');
  const { values, errors } = readRows(rows, ['level', 'alpha', 'beta'], [number, number, number]);
  errors.push(...tooMany(values.length, LIMITS.levels, 'levels'));
  if (errors.length === 0 && values.length < 2) errors.push({ line: 0, message: 'one level; accepted: at least two' });
  const sorted = [...values].sort((a, b) => Number(a[0]) - Number(b[0]));
  sorted.forEach((row, k) => {
    const due = String(k + 2 - sorted.length);
    if (row[0] !== due && errors.length === 0)
      errors.push({
        line: 0,
        message: `level ${row[0]} stands where ${due} was due; accepted: whole levels without gaps up to 1`,
      });
  });
  if (errors.length > 0) return { errors };
  return {
    time: { kind: 'multistep', alpha: sorted.map((row) => row[1]!), beta: sorted.map((row) => row[2]!) },
    errors,
  };
}

const answer = (definition: Definition, errors: readonly LineError[]): FileOutcome =>
  errors.length > 0 ? { errors: errors.slice(0, ERRORS_MAX) } : { definition };

/**
 * Reads a CSV file in place of the table of `into`, whose kind, equation and operator stay.
 * @returns the definition, or every fault with its line
 */
export function readDefinitionCsv(text: string, into: Definition): FileOutcome {
  if (text.length > FILE_CHARACTERS_MAX)
    return {
      errors: [
        { line: 0, message: `the file has ${text.length} characters; accepted: at most ${FILE_CHARACTERS_MAX}` },
      ],
    };
  if (text.includes('\0')) return { errors: [{ line: 0, message: 'this is not text; accepted: a CSV file in UTF-8' }] };
  const rows = csvRows(text);
  const place = (what: string) => (field: string) => rational(field, what);
  if (into.kind === 'time-method') {
    const { time, errors } = readMethod(rows);
    return answer(time ? { ...into, time } : into, errors);
  }
  if (into.kind === 'stencil') {
    const heading = [...offsetNames(into.dims), 'weight'];
    const weight = (field: string): Check => (field === '' ? { ok: '' } : rational(field, 'the weight'));
    const { values, errors } = readRows(rows, heading, [
      ...Array.from({ length: into.dims }, () => place('the offset')),
      weight,
    ]);
    const weights = values.map((row) => row.at(-1) ?? '');
    const given = weights.filter((one) => one !== '').length;
    if (given > 0 && given < weights.length)
      errors.push({
        line: 0,
        message: `${given} of ${weights.length} weights are given; accepted: all of them, or none`,
      });
    errors.push(...tooMany(values.length, LIMITS.nodes, 'points'));
    return answer(
      { ...into, offsets: values.map((row) => joined(row.slice(0, -1))), weights: given > 0 ? weights : null },
      errors,
    );
  }
  if (into.form !== 'table')
    return { errors: [{ line: 0, message: `a scheme of the form ${into.form} has no table; accepted: JSON` }] };
  const { dims } = CONVENTIONS[into.equation];
  const { values, errors } = readRows(
    rows,
    ['level', ...offsetNames(dims), 'coefficient'],
    [place('the level'), ...Array.from({ length: dims }, () => place('the offset')), expression],
  );
  errors.push(...tooMany(values.length, LIMITS.terms, 'terms'));
  return answer(
    {
      ...into,
      terms: values.map((row) => ({
        level: row[0]!,
        offset: joined(row.slice(1, -1)),
        coefficient: row.at(-1)!,
      })),
    },
    errors,
  );
}
