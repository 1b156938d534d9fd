/** The difference of two texts, as pieces to set: what stayed, and what was struck with what stands above it. */
import { diffArrays } from 'diff';

/** A run that both texts have, or one that was struck (`was`) with what took its place (`now`); either may be empty. */
export type Piece =
  | { readonly kind: 'same'; readonly text: string }
  | { readonly kind: 'fix'; readonly was: string; readonly now: string };

/** Two corrections with no more than this between them are set as one: a lone space or sign cannot be read there. */
const ISLAND = /^[\s,;()[\]*]{0,2}$/;

function joined(pieces: readonly Piece[]): Piece[] {
  const out: Piece[] = [];
  for (const piece of pieces) {
    const last = out.at(-1);
    if (!last || last.kind !== piece.kind) out.push(piece);
    else if (last.kind === 'same' && piece.kind === 'same')
      out.splice(-1, 1, { kind: 'same', text: last.text + piece.text });
    else if (last.kind === 'fix' && piece.kind === 'fix')
      out.splice(-1, 1, { kind: 'fix', was: last.was + piece.was, now: last.now + piece.now });
  }
  return out;
}

function withoutIslands(pieces: readonly Piece[]): Piece[] {
  return joined(
    pieces.map((piece, k): Piece => {
      const isIsland =
        piece.kind === 'same' &&
        pieces[k - 1]?.kind === 'fix' &&
        pieces[k + 1]?.kind === 'fix' &&
        ISLAND.test(piece.text);
      return isIsland ? { kind: 'fix', was: piece.text, now: piece.text } : piece;
    }),
  );
}

/** Words, figures with their decimals, operators of two signs, blanks, single signs: none is torn apart. */
const TOKENS = /\d+(?:\.\d+)?(?:e[+-]?\d+)?|[\p{L}_][\p{L}\p{N}_]*|[-+*/<>=!]=|\s+|[^]/giu;
const tokensOf = (text: string) => text.match(TOKENS) ?? [];

/** Word by word. Concatenating what stayed with every `was` gives the old text, with every `now` the new one. */
export function wordDifference(was: string, now: string): Piece[] {
  if (was === now) return was === '' ? [] : [{ kind: 'same', text: was }];
  const pieces = diffArrays(tokensOf(was), tokensOf(now)).map(({ value, added, removed }): Piece => {
    const text = value.join('');
    if (added) return { kind: 'fix', was: '', now: text };
    return removed ? { kind: 'fix', was: text, now: '' } : { kind: 'same', text };
  });
  return withoutIslands(joined(pieces));
}

/** A line of the new text, of both, or of the old one alone. Numbers count from 1. */
export type LineChange =
  | { readonly kind: 'same'; readonly was: number; readonly now: number; readonly text: string }
  | { readonly kind: 'changed'; readonly was: number; readonly now: number; readonly pieces: readonly Piece[] }
  | { readonly kind: 'added'; readonly now: number; readonly text: string }
  | { readonly kind: 'gone'; readonly was: number; readonly text: string };

/** A changed line that keeps less than this part of its characters is shown as one gone and one added. */
const LIKE_ENOUGH = 0.35;
/** So far ahead is a partner looked for; farther off a likeness is chance, and the search would take long. */
const LOOK_AHEAD = 8;

function asChanged(was: string, now: string): readonly Piece[] | null {
  const pieces = wordDifference(was, now);
  const kept = pieces.reduce((sum, piece) => sum + (piece.kind === 'same' ? piece.text.trim().length : 0), 0);
  return kept >= LIKE_ENOUGH * Math.max(was.trim().length, now.trim().length, 1) ? pieces : null;
}

/** Lines that were replaced, paired in their order where they are alike. */
function replaced(was: readonly string[], now: readonly string[], wasAt: number, nowAt: number): LineChange[] {
  const changes: LineChange[] = [];
  let k = 0;
  for (const [j, line] of now.entries()) {
    const partner = was.findIndex((old, at) => at >= k && at < k + LOOK_AHEAD && asChanged(old, line) !== null);
    const pieces = partner < 0 ? null : asChanged(was[partner]!, line);
    if (!pieces) {
      changes.push({ kind: 'added', now: nowAt + j, text: line });
      continue;
    }
    for (; k < partner; k++) changes.push({ kind: 'gone', was: wasAt + k, text: was[k]! });
    changes.push({ kind: 'changed', was: wasAt + partner, now: nowAt + j, pieces });
    k = partner + 1;
  }
  for (; k < was.length; k++) changes.push({ kind: 'gone', was: wasAt + k, text: was[k]! });
  return changes;
}

const linesOf = (text: string) => (text === '' ? [] : text.replace(/\n$/, '').split('\n'));

/** Line by line, and within lines that are alike word by word. */
export function lineDifference(was: string, now: string): LineChange[] {
  const changes: LineChange[] = [];
  let [wasAt, nowAt] = [1, 1];
  let struck: readonly string[] = [];
  const flush = (added: readonly string[]) => {
    changes.push(...replaced(struck, added, wasAt, nowAt));
    wasAt += struck.length;
    nowAt += added.length;
    struck = [];
  };
  for (const { value, added, removed } of diffArrays(linesOf(was), linesOf(now))) {
    if (removed) struck = value;
    else if (added) flush(value);
    else {
      flush([]);
      for (const text of value) changes.push({ kind: 'same', was: wasAt++, now: nowAt++, text });
    }
  }
  flush([]);
  return changes;
}
