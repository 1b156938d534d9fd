import { STATE_WORDS } from '@/components/marks/vial';
import type { RevisionLine } from '@/lib/entries/entry';

interface PairFormProps {
  slug: string;
  from: number;
  to: number;
  revisions: readonly RevisionLine[];
}

/** Which two revisions; the address carries the choice. */
export function PairForm({ slug, from, to, revisions }: PairFormProps) {
  const choice = (name: 'from' | 'to', label: string, value: number) => (
    <div className="field">
      <label htmlFor={`compare-${name}`}>{label}</label>
      <select id={`compare-${name}`} name={name} defaultValue={value}>
        {revisions.map(({ number, state }) => (
          <option key={number} value={number}>
            revision {number}, {STATE_WORDS[state].toLowerCase()}
          </option>
        ))}
      </select>
    </div>
  );
  return (
    <form className="bar" action={`/sheets/${slug}/compare`} method="get">
      {choice('from', 'From', from)}
      {choice('to', 'To', to)}
      <button type="submit" className="btn">
        Compare
      </button>
    </form>
  );
}
