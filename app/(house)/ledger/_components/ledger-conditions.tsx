import Link from 'next/link';
import { EVENT_KINDS } from '@/lib/ledger/event';
import { EVENT_WORDS } from '@/lib/ledger/event-words';
import { EVENT_NOUNS, FILTER_TITLE, type LedgerFilter } from '@/lib/ledger/ledger-filter';

interface LedgerConditionsProps {
  filter: LedgerFilter;
  names: readonly { id: string; name: string }[];
}

/** The conditions live in the address bar: a form that asks for a page, and works without a script. */
export const LedgerConditions = ({ filter, names }: LedgerConditionsProps) => (
  <form className="ledgerform" method="get" action="/ledger" role="search" aria-label="Conditions on the ledger">
    <label className="field">
      <span>{FILTER_TITLE.who}</span>
      <select name="who" defaultValue={filter.who ?? ''}>
        <option value="">anyone</option>
        <option value="house">the house itself</option>
        {names.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
      </select>
    </label>
    <label className="field">
      <span>{FILTER_TITLE.what}</span>
      <select name="what" defaultValue={filter.what ?? ''}>
        <option value="">anything</option>
        {EVENT_NOUNS.map((noun) => (
          <optgroup key={noun} label={noun}>
            <option value={noun}>every line about a {noun}</option>
            {EVENT_KINDS.filter((kind) => kind.startsWith(`${noun}.`)).map((kind) => (
              <option key={kind} value={kind}>
                {EVENT_WORDS[kind]} …
              </option>
            ))}
          </optgroup>
        ))}
      </select>
    </label>
    <label className="field">
      <span>{FILTER_TITLE.about}</span>
      <input name="about" defaultValue={filter.about} placeholder="address of an entry" maxLength={80} />
    </label>
    <label className="field">
      <span>{FILTER_TITLE.why}</span>
      <input name="why" defaultValue={filter.why} placeholder="words of the reason" maxLength={200} />
    </label>
    <label className="field">
      <span>{FILTER_TITLE.from}</span>
      <input name="from" type="date" defaultValue={filter.from} />
    </label>
    <label className="field">
      <span>{FILTER_TITLE.to}</span>
      <input name="to" type="date" defaultValue={filter.to} />
    </label>
    <div className="acts">
      <button className="btn main" type="submit">
        Show these lines
      </button>
      <Link className="btn lite" href="/ledger">
        All of the ledger
      </Link>
    </div>
  </form>
);
