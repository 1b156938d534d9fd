import { describe, expect, it } from 'vitest';
import { type LineChange, type Piece, lineDifference, wordDifference } from '@/lib/reviews/difference/text-difference';
import { randomFrom } from '../../support/random';

const oldOf = (pieces: readonly Piece[]) => pieces.map((one) => (one.kind === 'same' ? one.text : one.was)).join('');
const newOf = (pieces: readonly Piece[]) => pieces.map((one) => (one.kind === 'same' ? one.text : one.now)).join('');
const side = (changes: readonly LineChange[], which: 'was' | 'now') =>
  changes.flatMap((change) => {
    if (!(which in change)) return [];
    if (change.kind === 'changed') return [which === 'was' ? oldOf(change.pieces) : newOf(change.pieces)];
    return [change.text];
  });

describe('the difference of two lines', () => {
  it('strikes the figure that changed and sets the new one above it', () => {
    expect(wordDifference('|lambda| <= 0.73, halo 2', '|lambda| <= 0.7287, halo 2')).toEqual([
      { kind: 'same', text: '|lambda| <= ' },
      { kind: 'fix', was: '0.73', now: '0.7287' },
      { kind: 'same', text: ', halo 2' },
    ]);
  });

  it('has nothing to strike in equal texts, and nothing at all in empty ones', () => {
    expect(wordDifference('same', 'same')).toEqual([{ kind: 'same', text: 'same' }]);
    expect(wordDifference('', '')).toEqual([]);
  });

  it('gives both texts back, whatever they are', () => {
    const random = randomFrom(7);
    const text = () =>
      Array.from({ length: random.integer(0, 12) }, () =>
        random.pick(['a', 'b', ' ', 'w[i]', '-=', '\t', 'é', '0.5']),
      ).join('');
    for (let round = 0; round < 300; round++) {
      const [was, now] = [text(), text()];
      const pieces = wordDifference(was, now);
      expect([oldOf(pieces), newOf(pieces)]).toEqual([was, now]);
    }
  });
});

describe('the difference of two kernels', () => {
  const WAS = [
    '/* r3 */',
    'void step(size_t n,',
    '          const double *v,',
    '          double *w)',
    '{',
    '  w[i] = v[i] - c;',
    '}',
  ];
  const NOW = ['/* r4 */', 'void step(size_t n,', '          double *w)', '{', '  w[i] -= c;', '}'];

  it('numbers lines as each text has them, with what is gone in its place', () => {
    const changes = lineDifference(WAS.join('\n'), NOW.join('\n'));
    expect(changes.map(({ kind }) => kind)).toEqual(['changed', 'same', 'gone', 'same', 'same', 'changed', 'same']);
    expect(changes[2]).toEqual({ kind: 'gone', was: 3, text: '          const double *v,' });
    expect(changes[3]).toMatchObject({ was: 4, now: 3 });
  });

  it('shows a line as gone and another as added where they have little in common', () => {
    expect(
      lineDifference('for (i = 0; i < n; ++i)\n', 'return status;\n')
        .map(({ kind }) => kind)
        .sort(),
    ).toEqual(['added', 'gone']);
  });

  it('gives both texts back line by line, in order, whatever they are', () => {
    const random = randomFrom(11);
    const text = () =>
      Array.from({ length: random.integer(1, 9) }, () => random.pick(['a b', 'a c', 'x', '', 'a b c d']));
    for (let round = 0; round < 300; round++) {
      const [was, now] = [text(), text()];
      // A text that ends in an empty line cannot be told from one with a line break at its end.
      was.push('.');
      now.push('.');
      const changes = lineDifference(was.join('\n'), now.join('\n'));
      expect(side(changes, 'was')).toEqual(was);
      expect(side(changes, 'now')).toEqual(now);
      const numbers = (which: 'was' | 'now') =>
        changes.flatMap((change) => (which in change ? [(change as { was: number; now: number })[which]] : []));
      expect(numbers('was')).toEqual(was.map((_, k) => k + 1));
      expect(numbers('now')).toEqual(now.map((_, k) => k + 1));
    }
  });
});
