/** The shape of a definition checked by its schema, with every fault as a problem at its place. */
import type { z } from 'zod';
import { Definition } from '@/lib/entries/definition';
import type { Problem } from './facts';
import { problemAt } from './problem';

type Issue = z.core.$ZodIssue;

const pointerOf = (path: readonly PropertyKey[]) =>
  path.map((part) => `/${String(part).replace(/~/g, '~0').replace(/\//g, '~1')}`).join('');

/** A union says only that nothing fits; its most telling member says what would. */
function innermost(issue: Issue): Issue {
  if (issue.code !== 'invalid_union') return issue;
  const inner = issue.errors.flat();
  const telling = inner.find((i) => i.code !== 'invalid_type') ?? inner[0];
  return telling ? innermost({ ...telling, path: [...issue.path, ...telling.path] }) : issue;
}

function valueAt(input: unknown, path: readonly PropertyKey[]): unknown {
  let value = input;
  for (const part of path)
    value = typeof value === 'object' && value !== null ? (value as Record<PropertyKey, unknown>)[part] : undefined;
  return value;
}

function shown(value: unknown): string {
  if (value === undefined) return 'nothing';
  if (typeof value === 'string') return `'${value.length > 40 ? `${value.slice(0, 40)}…` : value}'`;
  if (value === null || typeof value === 'number' || typeof value === 'boolean') return String(value);
  return Array.isArray(value) ? 'a list' : 'an object';
}

const DISCRIMINATORS: Readonly<Record<string, string>> = {
  kind: 'stencil, time-method, scheme; for a time method runge-kutta, multistep, imex-multistep',
  form: 'table, lines, system',
};

function problemOf(found: Issue, input: unknown): Problem {
  const issue = innermost(found);
  const pointer = pointerOf(issue.path);
  const value = valueAt(input, issue.path);
  const last = issue.path[issue.path.length - 1];
  const discriminator = typeof last === 'string' ? DISCRIMINATORS[last] : undefined;
  if (issue.code === 'invalid_union' && discriminator)
    return problemAt(
      pointer,
      value === undefined ? 'missing' : 'unknown-value',
      `${shown(value)} is not known here; accepted: ${discriminator}`,
    );
  if (value === undefined)
    return problemAt(pointer, 'missing', `${pointer === '' ? 'the definition' : `'${String(last)}'`} is missing`);
  if (issue.code === 'too_big' && Array.isArray(value))
    return problemAt(
      pointer,
      'too-many',
      `${value.length} entries are too many; accepted: at most ${String(issue.maximum)}`,
    );
  if (issue.code === 'too_small' && Array.isArray(value))
    return problemAt(
      pointer,
      'too-few',
      `${value.length} entries are too few; accepted: at least ${String(issue.minimum)}`,
    );
  if (issue.code === 'too_big' || issue.code === 'too_small')
    return problemAt(pointer, 'out-of-range', `${shown(value)} is out of range: ${issue.message}`);
  if (issue.code === 'invalid_value')
    return problemAt(
      pointer,
      'unknown-value',
      `${shown(value)} is not known here; accepted: ${issue.values.map(String).join(', ')}`,
    );
  if (issue.code === 'invalid_type')
    return problemAt(pointer, 'wrong-type', `${shown(value)} stands here; accepted: ${issue.expected}`);
  return problemAt(pointer, 'bad-value', `${shown(value)} cannot be read; ${issue.message}`);
}

export function readDefinition(input: unknown): { definition: Definition | null; problems: Problem[] } {
  if (typeof input !== 'object' || input === null || Array.isArray(input))
    return {
      definition: null,
      problems: [problemAt('', 'wrong-type', `${shown(input)} is not a definition; accepted: an object with a "kind"`)],
    };
  const parsed = Definition.safeParse(input);
  if (parsed.success) return { definition: parsed.data, problems: [] };
  return { definition: null, problems: parsed.error.issues.slice(0, 50).map((issue) => problemOf(issue, input)) };
}
