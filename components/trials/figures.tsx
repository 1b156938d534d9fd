import { Fragment } from 'react';

const POWER_OF_TEN = /(\d(?:\.\d+)?)e([+-]?)0*(\d+)/gi;

/** Signs as the book sets them: ≥, ≤, ±, the long minus. */
const signs = (text: string) =>
  text
    .replace(/(^|[\s;,])x ?(?=\d)/g, '$1× ')
    .replace(/>=/g, '≥')
    .replace(/<=/g, '≤')
    .replace(/\+-|\+\/-/g, '±')
    .replace(/(^|[\s(≤≥=,])-(?=\d)/g, '$1−');

/** Figures of a finding: "1.1e-16" is set as a power of ten, ">= 1.9" with its sign. */
export function Figures({ text }: { text: string }) {
  const pieces: React.ReactNode[] = [];
  let from = 0;
  for (const match of text.matchAll(POWER_OF_TEN)) {
    const [whole, mantissa, minus, digits] = match;
    pieces.push(
      <Fragment key={match.index}>
        {signs(text.slice(from, match.index))}
        {mantissa} × 10
        <sup>
          {minus === '-' && '−'}
          {digits}
        </sup>
      </Fragment>,
    );
    from = match.index + whole.length;
  }
  return (
    <>
      {pieces}
      {signs(text.slice(from))}
    </>
  );
}
