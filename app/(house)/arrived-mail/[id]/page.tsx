import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { db } from '@/db/client';
import { findCaughtLetter } from '@/db/queries/caught-letters';
import { moment } from '@/lib/entries/dates';
import { env } from '@/lib/env';
import { requireCatcher } from '@/lib/mail/require-catcher';
import { senderOf } from '@/lib/mail/sender';

export const metadata: Metadata = { title: 'A letter' };

const ADDRESS = /(https?:\/\/[^\s<>"]+)/;

/** The text with addresses of this site as links; any other stays text. */
function Linked({ text, origin }: { text: string; origin: string }) {
  return text.split(ADDRESS).map((part, index) =>
    part.startsWith(`${origin}/`) ? (
      <a key={index} href={part}>
        {part}
      </a>
    ) : (
      part
    ),
  );
}

export default async function LetterPage({ params }: PageProps<'/arrived-mail/[id]'>) {
  await requireCatcher();
  const id = Number((await params).id);
  const letter = Number.isSafeInteger(id) && id > 0 ? await findCaughtLetter(db, id) : null;
  if (!letter) notFound();

  return (
    <>
      <header className="placehd">
        <p>
          <Link href="/arrived-mail">Arrived mail</Link>
        </p>
        <h1>{letter.subject}</h1>
        <p className="q">
          To {letter.recipient}, from {letter.sender}, arrived {moment(letter.arrivedAt.toISOString())}
        </p>
      </header>
      <section aria-labelledby="text">
        <h2 className="parthd" id="text">
          As plain text
        </h2>
        <pre className="mailtext">
          <Linked text={letter.text} origin={senderOf(env()).origin} />
        </pre>
      </section>
      {letter.html && (
        <p className="pager">
          <a href={`/arrived-mail/${letter.id}/html`}>The same letter as HTML</a>
        </p>
      )}
    </>
  );
}
