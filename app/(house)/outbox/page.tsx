import type { Metadata, Route } from 'next';
import Link from 'next/link';
import { Nothing } from '@/components/ui/nothing';
import { db } from '@/db/client';
import { type ListedLetter, countLetters, listLetters } from '@/db/queries/letters';
import { requireActor } from '@/lib/auth/require-actor';
import { env } from '@/lib/env';
import { moment } from '@/lib/entries/dates';
import { LETTER_STATES, type LetterState, goesOutAtOnce } from '@/lib/mail/letter';
import { LETTER_KIND_WORDS, LETTER_STATE_WORDS, letterSubject } from '@/lib/mail/letter-words';
import { TRIES_MOST } from '@/lib/mail/retry';
import { AgainForm } from './_components/again-form';

export const metadata: Metadata = { title: 'Outbox' };

const PAGE = 50;
const UUID = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/;
const one = (value: string | string[] | undefined) => (Array.isArray(value) ? value[0] : value);

function Standing({ letter }: { letter: ListedLetter }) {
  const { state, attempts, nextAt, lastError, sentAt } = letter;
  const tries = attempts === 1 ? 'one try' : `${attempts} tries`;
  if (state === 'sent') return <>sent {sentAt && moment(sentAt.toISOString())}</>;
  if (state === 'given-up') return <span className="fails">given up after {tries}</span>;
  if (state === 'kept-back') return <>kept back</>;
  if (attempts > 0)
    return (
      <>
        waiting; {tries} of {TRIES_MOST}, again {moment(nextAt.toISOString())}
        {!lastError && ' unless it is going out now'}
      </>
    );
  return <>{letter.wish === 'daily' && !goesOutAtOnce(letter.kind) ? 'waiting for the daily letter' : 'waiting'}</>;
}

/** Every letter of the house, and what became of it. */
export default async function OutboxPage({ searchParams }: PageProps<'/outbox'>) {
  await requireActor('administrator');
  const query = await searchParams;
  const state = LETTER_STATES.find((known) => known === one(query.state)) ?? null;
  const asked = one(query.before);
  const before = asked && UUID.test(asked) ? asked : null;
  const [counts, found] = await Promise.all([countLetters(db), listLetters(db, state, before, PAGE + 1)]);
  const letters = found.slice(0, PAGE);
  const { SMTP_URL, LEVELBOOK_MAIL_CATCHER } = env();
  const address = (of: LetterState | null, from?: string) => {
    const search = new URLSearchParams({ ...(of && { state: of }), ...(from && { before: from }) }).toString();
    return `/outbox${search && `?${search}`}` as Route;
  };

  return (
    <>
      <header className="placehd">
        <h1>Outbox</h1>
        <p className="q">
          {!SMTP_URL && 'The settings name no mail server (SMTP_URL): letters wait here until one is named. '}
          {LEVELBOOK_MAIL_CATCHER ? (
            <>
              No mail leaves this machine; what goes out is found under <Link href="/arrived-mail">Arrived mail</Link>.
            </>
          ) : (
            SMTP_URL &&
            'The worker sends what waits, tries again with longer and longer pauses, and gives up in the end.'
          )}
        </p>
      </header>
      <section aria-labelledby="letters">
        <h2 className="parthd" id="letters">
          Letters
        </h2>
        <nav className="pager" aria-label="Letters by state">
          <Link
            href={address(null)}
            aria-current={state === null ? 'page' : undefined}
            className={state ? '' : 'ticks'}
          >
            all
          </Link>
          {LETTER_STATES.map((each) => (
            <Link
              key={each}
              href={address(each)}
              aria-current={state === each ? 'page' : undefined}
              className={state === each ? 'ticks' : ''}
            >
              {LETTER_STATE_WORDS[each]} {counts[each]}
            </Link>
          ))}
        </nav>
        {counts['given-up'] > 1 && <AgainForm label={`All ${counts['given-up']} that were given up`} />}
        {letters.length === 0 ? (
          <div className="lone">
            <Nothing />
            <p>{state ? `No letter is ${LETTER_STATE_WORDS[state]}.` : 'No letter has been written yet.'}</p>
          </div>
        ) : (
          <table className="outbox stacked">
            <thead>
              <tr>
                <th scope="col">Written</th>
                <th scope="col">To</th>
                <th scope="col">What</th>
                <th scope="col">State</th>
                <th scope="col">
                  <span className="sr">What can be done</span>
                </th>
              </tr>
            </thead>
            <tbody>
              {letters.map((letter) => (
                <tr key={letter.id}>
                  <td>{moment(letter.createdAt.toISOString())}</td>
                  <td>
                    {letter.recipient} <small className="q">{letter.email}</small>
                  </td>
                  <td>
                    {LETTER_KIND_WORDS[letter.kind]} <small className="q">{letterSubject(letter.payload)}</small>
                  </td>
                  <td>
                    <Standing letter={letter} />
                    {letter.lastError && <p className="small q">{letter.lastError}</p>}
                  </td>
                  <td>
                    {letter.state === 'given-up' && (
                      <AgainForm letterId={letter.id} label={`Letter to ${letter.recipient}`} />
                    )}
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        )}
        <nav className="pager" aria-label="Pages of the outbox">
          {before && <Link href={address(state)}>Latest letters</Link>}
          {found.length > PAGE && <Link href={address(state, letters.at(-1)?.id)}>Earlier letters</Link>}
        </nav>
      </section>
    </>
  );
}
