import 'server-only';
import type { CandidateRow } from '@/db/queries/candidates';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import { compileScheme, type NumericScheme } from '@/lib/numerics/numeric-scheme';

const KEPT_MAX = 2_000;
const compiled = new Map<string, NumericScheme | null>();

/** The scheme of a revision in doubles, compiled once a process; null where its definition has none. */
export function numericOf({ revisionId, version, definition }: CandidateRow): NumericScheme | null {
  const key = `${revisionId}:${version}`;
  const known = compiled.get(key);
  if (known !== undefined) return known;
  const { scheme } = definition.kind === 'scheme' ? canonicalScheme(definition) : { scheme: null };
  const numeric = scheme && compileScheme(scheme);
  if (compiled.size >= KEPT_MAX) compiled.delete(compiled.keys().next().value ?? key);
  compiled.set(key, numeric);
  return numeric;
}
