import type { ReactNode } from 'react';
import type { Piece } from '@/lib/reviews/difference/text-difference';

/** A correction: the old struck, the new set above it; spoken as the new, then "was" the old. */
export function Fix({ was, now }: { was: ReactNode | null; now: ReactNode | null }) {
  if (was === null) return <ins className="added">{now}</ins>;
  return (
    <span className="fix">
      <ins>{now ?? <i>gone</i>}</ins>
      <span className="sr"> was </span>
      <del>{was}</del>
    </span>
  );
}

/** Text with its corrections in their places. */
export function Pieces({ pieces }: { pieces: readonly Piece[] }) {
  return pieces.map((piece, k) =>
    piece.kind === 'same' ? (
      <span key={k}>{piece.text}</span>
    ) : (
      <Fix key={k} was={piece.was === '' ? null : piece.was} now={piece.now === '' ? null : piece.now} />
    ),
  );
}
