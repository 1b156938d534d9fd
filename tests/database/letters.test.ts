import { eq, sql } from 'drizzle-orm';
import { simpleParser, type ParsedMail } from 'mailparser';
import { SMTPServer, type SMTPServerOptions } from 'smtp-server';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { databaseOn, openPool } from '@/db/client';
import { insertLetters } from '@/db/queries/house';
import { setLetterWish } from '@/db/queries/people';
import { letters } from '@/db/schema/house';
import { links, people } from '@/db/schema/people';
import { openPost } from '@/lib/mail/deliver';
import type { LetterKind } from '@/lib/mail/letter';
import { sendDueLetters } from '@/lib/mail/send-due-letters';
import type { Actor } from '@/lib/people/actor';
import { hashOfSecret } from '@/lib/people/link-secret';
import { aPerson } from '../support/makers';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();
const SENDER = { origin: 'https://book.example.org', office: 'Brackwater Modelling Office' };
const LIMITS = { connectMs: 400, silenceMs: 400, wholeMs: 2_000 };
const REVISION = {
  revisionId: '5b7f3a52-6a3e-4d8e-9b1e-2f6f6c1d0a11',
  slug: 'leapfrog-central-2',
  number: 2,
  title: 'Leapfrog, central in space',
};
const DECISION = { ...REVISION, sentence: 'Agrees with the source.' };
const RECALL = { ...DECISION, kind: 'withdrawn', useInstead: null, codes: ['Saltings'] };

let arrived: { to: string; mail: ParsedMail }[] = [];
let closeServer: (() => Promise<void>) | null = null;

/** A real mail server at a free port of this machine. */
async function aMailServer(more: Partial<SMTPServerOptions> = {}): Promise<string> {
  const server = new SMTPServer({
    disabledCommands: ['AUTH', 'STARTTLS'],
    logger: false,
    onData(stream, { envelope }, done) {
      simpleParser(stream).then((mail) => {
        arrived.push(...envelope.rcptTo.map(({ address }) => ({ to: address, mail })));
        done();
      }, done);
    },
    ...more,
  });
  server.on('error', () => undefined);
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  closeServer = () => new Promise((resolve) => server.close(resolve));
  const address = server.server.address();
  if (typeof address !== 'object' || !address) throw new Error('the mail server has no port');
  return `smtp://127.0.0.1:${address.port}`;
}

const round = (url: string, on = db) =>
  sendDueLetters(on, {
    sender: SENDER,
    post: openPost(url, 'Levelbook <levelbook@book.example.org>', LIMITS),
    demoMode: true,
    isOver: () => false,
  });
const write = (kind: LetterKind, to: Actor, payload: Record<string, unknown>) =>
  insertLetters(db, kind, [to.id], payload);
const rowsOf = (person: Actor) => db.select().from(letters).where(eq(letters.recipientId, person.id));
const rowOf = async (person: Actor) => (await rowsOf(person))[0];
const dueNow = () =>
  db
    .update(letters)
    .set({ nextAt: sql`now()` })
    .where(eq(letters.state, 'waiting'));

let reader: Actor;
beforeEach(async () => {
  arrived = [];
  await db.delete(letters);
  reader = await aPerson('contributor');
});
afterEach(async () => {
  await closeServer?.();
  closeServer = null;
});

describe('the outbox', () => {
  it('sends what waits, as plain text and HTML, with the link to the page', async () => {
    const url = await aMailServer();
    await write('vetted', reader, DECISION);
    expect(await round(url)).toBe(1);
    expect(await rowOf(reader)).toMatchObject({
      state: 'sent',
      attempts: 1,
      sentAt: expect.any(Date),
      lastError: null,
    });
    const [letter] = arrived;
    expect(letter?.to).toBe(reader.email);
    expect(letter?.mail.subject).toBe('Vetted: Leapfrog, central in space, revision 2');
    expect(letter?.mail.text).toContain('https://book.example.org/sheets/leapfrog-central-2/2');
    expect(letter?.mail.html).toContain('href="https://book.example.org/sheets/leapfrog-central-2/2"');
    expect(letter?.mail.from?.text).toContain('levelbook@book.example.org');
    expect(letter?.mail.headers.get('auto-submitted')).toBe('auto-generated');
    expect(await round(url)).toBe(0);
  });

  it('sends each letter once where two workers look at the same moment', async () => {
    const url = await aMailServer();
    const others = await Promise.all(Array.from({ length: 12 }, () => aPerson('maintainer')));
    await insertLetters(
      db,
      'submitted',
      others.map(({ id }) => id),
      { ...REVISION, author: 'Sanna Varga' },
    );
    const second = openPool(process.env.DATABASE_URL);
    const sent = await Promise.all([round(url), round(url, databaseOn(second))]);
    await second.end();
    expect(sent[0]! + sent[1]!).toBe(12);
    expect(arrived.map(({ to }) => to).sort()).toEqual(others.map(({ email }) => email).sort());
  });

  it('leaves a letter that another worker has in hand, and takes it up again when that worker is lost', async () => {
    const url = await aMailServer();
    await write('vetted', reader, DECISION);
    // Taken up, never finished: what a worker leaves that is killed while it sends.
    await db.update(letters).set({ attempts: 1, nextAt: sql`now() + interval '3 minutes'` });
    expect(await round(url)).toBe(0);
    await dueNow();
    expect(await round(url)).toBe(1);
    expect(await rowOf(reader)).toMatchObject({ state: 'sent', attempts: 2 });
  });
});

describe('a bad day of the mail server', () => {
  it('away: the letter waits, with the cause, and no other is tried in vain', async () => {
    const url = await aMailServer();
    await closeServer?.();
    closeServer = null;
    const second = await aPerson('contributor');
    await write('vetted', reader, DECISION);
    await write('vetted', second, DECISION);
    expect(await round(url)).toBe(0);
    const rows = [await rowOf(reader), await rowOf(second)];
    expect(rows.map((row) => row?.state)).toEqual(['waiting', 'waiting']);
    expect(rows.map((row) => row?.attempts).sort()).toEqual([0, 1]);
    const tried = rows.find((row) => row?.attempts === 1);
    expect(tried?.lastError).toContain('ECONNREFUSED');
    expect(tried!.nextAt.getTime() - Date.now()).toBeGreaterThan(50_000);
  });

  it('back again: what waited goes out', async () => {
    await write('vetted', reader, DECISION);
    await round('smtp://127.0.0.1:9');
    await dueNow();
    expect(await round(await aMailServer())).toBe(1);
    expect(await rowOf(reader)).toMatchObject({ state: 'sent', attempts: 2, lastError: null });
  });

  it('slow: it is not waited for longer than the limit', async () => {
    const url = await aMailServer({ onConnect: (_, done) => void setTimeout(done, 3_000) });
    await write('vetted', reader, DECISION);
    const since = Date.now();
    expect(await round(url)).toBe(0);
    expect(Date.now() - since).toBeLessThan(2_900);
    expect(await rowOf(reader)).toMatchObject({
      state: 'waiting',
      attempts: 1,
      lastError: expect.stringMatching(/imeout|longer/),
    });
  });

  it('refusing one address: that letter is given up at once, and the others go out', async () => {
    const gone = await aPerson('contributor');
    const url = await aMailServer({
      onRcptTo: ({ address }, _, done) =>
        done(address === gone.email ? Object.assign(new Error('No such mailbox'), { responseCode: 550 }) : null),
    });
    await write('vetted', gone, DECISION);
    await write('vetted', reader, DECISION);
    expect(await round(url)).toBe(1);
    expect(await rowOf(gone)).toMatchObject({ state: 'given-up', attempts: 1 });
    expect((await rowOf(gone))?.lastError).toContain('No such mailbox');
    expect(await rowOf(reader)).toMatchObject({ state: 'sent' });
  });

  it('refusing for now: the letter is tried again, each time later, and given up after the ninth try', async () => {
    const url = await aMailServer({
      onRcptTo: (_, __, done) => done(Object.assign(new Error('Try again later'), { responseCode: 451 })),
    });
    await write('vetted', reader, DECISION);
    const waits = [];
    for (let tries = 1; tries <= 9; tries++) {
      await dueNow();
      await round(url);
      const row = await rowOf(reader);
      expect(row?.attempts).toBe(tries);
      if (row?.state === 'waiting') waits.push(Math.round((row.nextAt.getTime() - Date.now()) / 60_000));
    }
    expect(waits).toEqual([1, 5, 15, 60, 240, 720, 1440, 1440]);
    expect(await rowOf(reader)).toMatchObject({
      state: 'given-up',
      lastError: expect.stringContaining('Try again later'),
    });
  });
});

describe('what each person wishes', () => {
  it('none: nothing but recalls and links that were asked for', async () => {
    const url = await aMailServer();
    await setLetterWish(db, reader.id, 'none');
    await write('vetted', reader, DECISION);
    await write('recall', reader, RECALL);
    await write('password-reset', reader, {});
    expect(await round(url)).toBe(2);
    const states = Object.fromEntries((await rowsOf(reader)).map(({ kind, state }) => [kind, state]));
    expect(states).toEqual({ vetted: 'kept-back', recall: 'sent', 'password-reset': 'sent' });
  });

  it('daily: one letter with everything of the days before, once a morning has passed; recalls at once', async () => {
    const url = await aMailServer();
    await setLetterWish(db, reader.id, 'daily');
    await write('vetted', reader, DECISION);
    await write('returned', reader, { ...DECISION, title: 'Box scheme', sentence: 'The sign of b.' });
    await write('recall', reader, RECALL);
    expect(await round(url)).toBe(1);
    expect(arrived.map(({ mail }) => mail.subject)).toEqual([
      'Recall: Leapfrog, central in space, revision 2 is withdrawn',
    ]);
    await db
      .update(letters)
      .set({ createdAt: sql`${letters.createdAt} - interval '1 day'` })
      .where(eq(letters.state, 'waiting'));
    const second = openPool(process.env.DATABASE_URL);
    const sent = await Promise.all([round(url), round(url, databaseOn(second))]);
    await second.end();
    expect(sent[0]! + sent[1]!).toBe(1);
    const daily = arrived[1]?.mail;
    expect(daily?.subject).toBe('2 letters of the day in one');
    expect(daily?.text).toContain('Leapfrog, central in space');
    expect(daily?.text).toContain('The sign of b.');
    expect((await rowsOf(reader)).every(({ state }) => state === 'sent')).toBe(true);
  });

  it('a closed account is written to no more', async () => {
    await write('recall', reader, RECALL);
    await db
      .update(people)
      .set({ disabledAt: sql`now()` })
      .where(eq(people.id, reader.id));
    expect(await round(await aMailServer())).toBe(0);
    expect(await rowOf(reader)).toMatchObject({ state: 'kept-back', lastError: 'Its reader has no open account.' });
  });
});

describe('a letter with a link', () => {
  it('gets its secret as it goes out; database and outbox never have it', async () => {
    const url = await aMailServer();
    await write('invitation', reader, { by: 'Ruth Halloran', role: 'contributor' });
    expect(await round(url)).toBe(1);
    const secret = /\/invitation\/([A-Za-z0-9_-]{43})\b/.exec(arrived[0]?.mail.text ?? '')?.[1];
    expect(secret).toBeDefined();
    const [link] = await db.select().from(links).where(eq(links.personId, reader.id));
    expect(link).toMatchObject({ purpose: 'invitation', hash: hashOfSecret(secret!), endedAt: null });
    expect(JSON.stringify([await rowsOf(reader), link])).not.toContain(secret);
  });

  it('for a new password is not sent a day late', async () => {
    await write('password-reset', reader, {});
    await db.update(letters).set({ createdAt: sql`now() - interval '25 hours'` });
    expect(await round(await aMailServer())).toBe(0);
    expect(await rowOf(reader)).toMatchObject({ state: 'given-up' });
    expect(await db.select().from(links).where(eq(links.personId, reader.id))).toEqual([]);
  });
});

it('a letter that cannot be written is given up with the reason, and holds up no other', async () => {
  const url = await aMailServer();
  const second = await aPerson('contributor');
  await write('vetted', reader, { title: 'no more than a title' });
  await write('vetted', second, DECISION);
  expect(await round(url)).toBe(1);
  expect(await rowOf(reader)).toMatchObject({
    state: 'given-up',
    lastError: expect.stringContaining('could not be written'),
  });
});
