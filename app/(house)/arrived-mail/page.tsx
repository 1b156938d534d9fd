import type { Metadata, Route } from 'next';
import Link from 'next/link';
import { Nothing } from '@/components/ui/nothing';
import { db } from '@/db/client';
import { listCaughtLetters } from '@/db/queries/caught-letters';
import { moment } from '@/lib/entries/dates';
import { requireCatcher } from '@/lib/mail/require-catcher';

export const metadata: Metadata = { title: 'Arrived mail' };

const PAGE = 50;
const one = (value: string | string[] | undefined) => (Array.isArray(value) ? value[0] : value);

/** What the local mail catcher was given. */
export default async function ArrivedMailPage({ searchParams }: PageProps<'/arrived-mail'>) {
  await requireCatcher();
  const query = await searchParams;
  const recipient = one(query.to)?.trim() || null;
  const asked = Number(one(query.before));
  const before = Number.isSafeInteger(asked) && asked > 0 ? asked : null;
  const found = await listCaughtLetters(db, { recipient, before }, PAGE + 1);
  const letters = found.slice(0, PAGE);
  const address = (from?: number) => {
    const search = new URLSearchParams({ ...(recipient && { to: recipient }), ...(from && { before: String(from) }) });
    return `/arrived-mail${search.size > 0 ? `?${search.toString()}` : ''}` as Route;
  };

  return (
    <>
      <header className="placehd">
        <h1>Arrived mail</h1>
        <p className="q">
          A mail catcher stands in for the mail server here: no letter leaves this machine. The{' '}
          <Link href="/outbox">Outbox</Link> has what still waits.
        </p>
      </header>
      <section aria-labelledby="arrived">
        <h2 className="parthd" id="arrived">
          Letters
        </h2>
        <form
          className="form inrow"
          method="get"
          action="/arrived-mail"
          role="search"
          aria-label="Conditions on letters"
        >
          <label className="field">
            <span>To</span>
            <input name="to" type="email" defaultValue={recipient ?? ''} placeholder="anyone" maxLength={254} />
          </label>
          <div className="acts">
            <button className="btn" type="submit">
              Show these letters
            </button>
          </div>
        </form>
        {letters.length === 0 ? (
          <div className="lone">
            <Nothing />
            <p>{recipient ? `Nothing has arrived for ${recipient}.` : 'Nothing has arrived yet.'}</p>
          </div>
        ) : (
          <table className="stacked">
            <thead>
              <tr>
                <th scope="col">Arrived</th>
                <th scope="col">To</th>
                <th scope="col">Subject</th>
              </tr>
            </thead>
            <tbody>
              {letters.map((letter) => (
                <tr key={letter.id}>
                  <td>{moment(letter.arrivedAt.toISOString())}</td>
                  <td>{letter.recipient}</td>
                  <td>
                    <Link href={`/arrived-mail/${letter.id}` as Route}>{letter.subject}</Link>
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        )}
        <nav className="pager" aria-label="Pages of letters">
          {before && <Link href={address()}>Latest letters</Link>}
          {found.length > PAGE && <Link href={address(letters.at(-1)?.id)}>Earlier letters</Link>}
        </nav>
      </section>
    </>
  );
}
