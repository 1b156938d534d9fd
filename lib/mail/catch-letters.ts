import 'server-only';
import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import type { Database } from '@/db/client';
import { insertCaughtLetter } from '@/db/queries/caught-letters';

/** Letters are short; what is longer is not ours. */
const SIZE_MOST = 2 * 1024 * 1024;

/**
 * A mail server that delivers nothing: it puts what it is given into the database, where a page shows it.
 * Listens on this machine only.
 * @returns its port, and a way to stop it
 */
export async function catchLetters(db: Database, port: number): Promise<{ port: number; stop: () => Promise<void> }> {
  const server = new SMTPServer({
    disabledCommands: ['AUTH', 'STARTTLS'],
    size: SIZE_MOST,
    banner: 'Levelbook catches letters here and delivers none',
    logger: false,
    onData(stream, { envelope }, done) {
      simpleParser(stream).then(async ({ subject, text, html }) => {
        for (const { address } of envelope.rcptTo)
          await insertCaughtLetter(db, {
            sender: envelope.mailFrom ? envelope.mailFrom.address : '',
            recipient: address.toLowerCase(),
            subject: subject ?? '',
            text: text ?? '',
            html: html || '',
          });
        done();
      }, done);
    },
  });
  server.on('error', () => undefined);
  await new Promise<void>((resolve, reject) => {
    server.server.once('error', reject);
    server.listen(port, '127.0.0.1', resolve);
  });
  const address = server.server.address();
  return {
    port: typeof address === 'object' && address ? address.port : port,
    stop: () => new Promise((resolve) => server.close(resolve)),
  };
}
