import { Fragment } from 'react';

/** Letters of mathematics within a sentence, with their index: λ, θ, r_x, n, |g|; the rest is text. */
const LETTERS = /((?:[λθκσμνγτ](?:ₓ|ᵧ)?|(?<![\p{L}\p{N}_])[nrgq](?![\p{L}\p{N}-]))(?:_[xyz])?)/u;

function Letter({ text }: { text: string }) {
  const [letter, index] = text.split('_');
  return (
    <span className="m">
      {letter}
      {index && <sub>{index}</sub>}
    </span>
  );
}

/** A sentence whose mathematical letters are set italic, in the face of formulas. */
export function Letters({ text }: { text: string }) {
  return text
    .replace(/<=/g, ' ≤ ')
    .replace(/>=/g, ' ≥ ')
    .replace(/ {2,}/g, ' ')
    .split(LETTERS)
    .map((piece, k) => (k % 2 === 1 ? <Letter key={k} text={piece} /> : <Fragment key={k}>{piece}</Fragment>));
}
