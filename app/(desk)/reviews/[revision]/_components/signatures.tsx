import type { GivenSignature } from '@/db/queries/review-desk';
import { longDate } from '@/lib/entries/dates';

/** Who signed, and what they said; signatures under an earlier text stay, struck. */
export function Signatures({ given }: { given: readonly GivenSignature[] }) {
  if (given.length === 0) return null;
  return (
    <ul className="signatures">
      {given.map(({ id, name, at, sentence, isVoid }) => (
        <li key={id} className="talk">
          <div>
            {isVoid ? <del>{name}</del> : <b>{name}</b>}
            <div className="small q">{longDate(at)}</div>
          </div>
          <div>
            <p>“{sentence}”</p>
            {isVoid && <p className="small red">Void: the text has changed since.</p>}
          </div>
        </li>
      ))}
    </ul>
  );
}
