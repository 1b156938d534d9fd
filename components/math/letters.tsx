import { Fragment } from 'react';

/** Letters of mathematics within a sentence: Greek, n and its neighbours, |g|; the rest is text. */
const LETTERS = /([λθκσμνγτ](?:ₓ|ᵧ|_[xyz])?|(?<![\p{L}\p{N}])(?:n|r|g|q)(?![\p{L}\p{N}-]))/u;

/** A sentence whose mathematical letters are set italic, in the face of formulas. */
export function Letters({ text }: { text: string }) {
  return text.split(LETTERS).map((piece, k) =>
    k % 2 === 1 ? (
      <span key={k} className="m">
        {piece}
      </span>
    ) : (
      <Fragment key={k}>{piece}</Fragment>
    ),
  );
}
