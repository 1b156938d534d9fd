import { Fragment } from 'react';

const INLINE = /(`[^`]+`|\*\*[^*]+\*\*|\*[^*]+\*)/;

function Inline({ text }: { text: string }) {
  return text.split(INLINE).map((piece, k) => {
    if (piece.startsWith('`') && piece.length > 2) return <code key={k}>{piece.slice(1, -1)}</code>;
    if (piece.startsWith('**') && piece.length > 4) return <b key={k}>{piece.slice(2, -2)}</b>;
    if (piece.startsWith('*') && piece.length > 2) return <i key={k}>{piece.slice(1, -1)}</i>;
    return <Fragment key={k}>{piece}</Fragment>;
  });
}

/**
 * People's own text: the part of Markdown that notes and remarks need (paragraphs, lists, emphasis, code).
 * Anything else is shown as it was typed; no HTML is read.
 */
export function Prose({ text }: { text: string }) {
  const blocks = text
    .trim()
    .split(/\n\s*\n/)
    .filter(Boolean);
  return (
    <div className="prose">
      {blocks.map((block, k) => {
        const rows = block.split('\n');
        if (!rows.every((row) => /^\s*[-*] /.test(row))) return <p key={k}>{<Inline text={block} />}</p>;
        return (
          <ul key={k}>
            {rows.map((row, j) => (
              <li key={j}>
                <Inline text={row.replace(/^\s*[-*] /, '')} />
              </li>
            ))}
          </ul>
        );
      })}
    </div>
  );
}
