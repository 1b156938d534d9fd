import 'server-only';
import type { CandidateRow } from '@/db/queries/candidates';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import { compileScheme, type NumericScheme } from '@/lib/numerics/numeric-scheme';
import { BoundedMap } from './bounded-map';

const compiled = new BoundedMap<string, NumericScheme | null>(2_000);

/** The scheme of a revision in doubles, compiled once a process; null where its definition has none. */
export function numericOf({ revisionId, version, definition }: CandidateRow): NumericScheme | null {
  const key = `${revisionId}:${version}`;
  const known = compiled.get(key);
  if (known !== undefined) return known;
  const { scheme } = definition.kind === 'scheme' ? canonicalScheme(definition) : { scheme: null };
  const numeric = scheme && compileScheme(scheme);
  return compiled.set(key, numeric);
}
