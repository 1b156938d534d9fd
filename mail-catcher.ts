/**
 * The local mail catcher: a mail server at the port of SMTP_URL that delivers nothing and shows what it was given
 * under "Arrived mail". For the demo, development and tests.
 * Started with `node --conditions=react-server --import tsx mail-catcher.ts`.
 */
import { db, pool } from '@/db/client';
import { env } from '@/lib/env';
import { catchLetters } from '@/lib/mail/catch-letters';

const { SMTP_URL, LEVELBOOK_MAIL_CATCHER } = env();
if (!SMTP_URL || !LEVELBOOK_MAIL_CATCHER)
  throw new Error('The mail catcher needs LEVELBOOK_MAIL_CATCHER=1 and SMTP_URL=smtp://127.0.0.1:PORT.');

const catcher = await catchLetters(db, Number(new URL(SMTP_URL).port));

for (const name of ['SIGTERM', 'SIGINT', 'SIGHUP'] as const)
  process.once(name, () => {
    void catcher
      .stop()
      .then(() => pool.end())
      .then(() => process.exit(0));
  });
