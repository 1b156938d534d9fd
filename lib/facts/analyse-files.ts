/**
 * `npm run --silent analyse -- FILE...`: definitions from JSON files ("-" is standard input), facts to standard output.
 * A file holds one definition, or an array of definitions or of {"id", "definition", "at"}.
 * Exit status 0, or 1 where a definition is invalid or a file cannot be read.
 */
import { readFileSync } from 'node:fs';
import { createBudget } from '@/lib/numerics/budget';
import { z } from 'zod';
import { analyseDefinition } from './analyse-definition';
import type { Analysis } from './facts';

const TIME_LIMIT_MS = 60_000;

const Points = z.array(
  z.object({ parameters: z.record(z.string(), z.coerce.string()), theta: z.array(z.coerce.string()) }),
);

interface Line extends Analysis {
  id: string | null;
  definition: unknown;
}

const isObject = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

function analyseItem(item: unknown): Line {
  const isWrapped = isObject(item) && 'definition' in item;
  const definition = isWrapped ? item['definition'] : item;
  const id =
    isObject(item) && (typeof item['id'] === 'string' || typeof item['id'] === 'number') ? String(item['id']) : null;
  const points = isWrapped && item['at'] !== undefined ? Points.safeParse(item['at']) : null;
  const analysis = analyseDefinition(definition, {
    budget: createBudget({ timeLimitMs: TIME_LIMIT_MS }),
    ...(points?.success ? { at: points.data } : {}),
  });
  if (points && !points.success)
    analysis.problems.push({
      pointer: '/at',
      severity: 'warning',
      code: 'bad-sample',
      message: '"at" cannot be read; accepted: a list of {"parameters":{"lambda":"1/2"},"theta":["1/4*pi"]}',
    });
  const { verdict, problems, facts, samples } = analysis;
  return { id, definition, verdict, problems, facts, ...(samples ? { samples } : {}) };
}

function readItems(file: string): unknown[] {
  let text: string;
  try {
    text = readFileSync(file === '-' ? 0 : file, 'utf8');
  } catch (error) {
    throw new Error(`${file}: cannot be read (${(error as NodeJS.ErrnoException).code ?? 'unknown reason'})`);
  }
  try {
    const value: unknown = JSON.parse(text);
    return Array.isArray(value) ? value : [value];
  } catch (error) {
    throw new Error(`${file === '-' ? 'standard input' : file}: is not JSON (${(error as Error).message})`);
  }
}

function run(files: readonly string[]): number {
  if (files.length === 0) {
    process.stderr.write('usage: npm run --silent analyse -- FILE...   ("-" is standard input)\n');
    return 1;
  }
  let items: unknown[];
  try {
    items = files.flatMap(readItems);
  } catch (error) {
    process.stderr.write(`analyse: ${(error as Error).message}\n`);
    return 1;
  }
  const lines = items.map(analyseItem);
  process.stdout.write(`${JSON.stringify(lines, null, 2)}\n`);
  return lines.some((line) => line.verdict === 'invalid') ? 1 : 0;
}

process.exitCode = run(process.argv.slice(2));
