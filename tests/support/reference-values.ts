/** Comparison of facts with values from outside: fractions by value, decimals within a tolerance, the rest by equality. */
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { equals, parseRational } from '@/lib/numerics/rational';

export function referenceValues<T>(file: string): T {
  return JSON.parse(readFileSync(path.join(import.meta.dirname, '../reference/values', file), 'utf8')) as T;
}

const isFraction = (text: string) => /^[-+]?\d+(\/\d+)?$/.test(text);

/** @returns the places at which `actual` differs from what is expected; keys that are not expected are not looked at */
export function differences(expected: unknown, actual: unknown, tolerance = 1e-12, place = ''): string[] {
  const differs = [`${place}: expected ${JSON.stringify(expected)}, found ${JSON.stringify(actual)}`];
  if (typeof expected === 'number')
    return typeof actual === 'number' && Math.abs(expected - actual) <= tolerance * Math.max(1, Math.abs(expected))
      ? []
      : differs;
  if (typeof expected === 'string' && isFraction(expected))
    return typeof actual === 'string' && isFraction(actual) && equals(parseRational(expected), parseRational(actual))
      ? []
      : differs;
  if (Array.isArray(expected)) {
    if (!Array.isArray(actual) || actual.length !== expected.length) return differs;
    return expected.flatMap((value, k) => differences(value, actual[k], tolerance, `${place}/${k}`));
  }
  if (typeof expected === 'object' && expected !== null) {
    const found = (actual ?? {}) as Record<string, unknown>;
    return Object.entries(expected).flatMap(([key, value]) =>
      differences(value, found[key], tolerance, `${place}/${key}`),
    );
  }
  return expected === actual ? [] : differs;
}
