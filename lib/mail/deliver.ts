import 'server-only';
import nodemailer from 'nodemailer';
import type { ComposedLetter } from './compose-letter';

export interface Post {
  from: string;
  /** Hands a letter to the mail server. */
  deliver: (letter: ComposedLetter, to: { name: string; email: string }, messageId: string) => Promise<Delivery>;
}

export type Delivery =
  | { kind: 'accepted' }
  /** The server will not have this letter, today or later. */
  | { kind: 'refused'; reason: string }
  /** It may work another time. */
  | { kind: 'failed'; reason: string }
  /** There is no server to talk to: no other letter would fare better now. */
  | { kind: 'away'; reason: string };

/** How long each step may take; together less than the lease of a letter. */
export interface PostLimits {
  connectMs: number;
  /** Without a word from the server. */
  silenceMs: number;
  wholeMs: number;
}
export const POST_LIMITS: PostLimits = { connectMs: 10_000, silenceMs: 30_000, wholeMs: 90_000 };

/** From a client's point of view; the message of an error may hold the server's address, never the password. */
interface PostError {
  code?: unknown;
  command?: unknown;
  responseCode?: unknown;
  message: string;
}

const AWAY = new Set([
  'ECONNECTION',
  'ECONNREFUSED',
  'ECONNRESET',
  'EDNS',
  'ENOTFOUND',
  'ETIMEDOUT',
  'ESOCKET',
  'ETLS',
  'EAUTH',
]);
const ABOUT_THE_LETTER = new Set(['RCPT TO', 'DATA']);

function deliveryOfError(error: PostError): Delivery {
  const reason = error.message.replaceAll(/\s+/g, ' ').slice(0, 300);
  const { responseCode } = error;
  if (typeof responseCode === 'number' && ABOUT_THE_LETTER.has(String(error.command)))
    return { kind: responseCode >= 500 ? 'refused' : 'failed', reason };
  return { kind: AWAY.has(String(error.code)) ? 'away' : 'failed', reason };
}

/** @param smtpUrl smtp: or smtps:, with user and password where the server asks for them */
export function openPost(smtpUrl: string, from: string, limits: PostLimits = POST_LIMITS): Post {
  const transport = nodemailer.createTransport({
    url: smtpUrl,
    connectionTimeout: limits.connectMs,
    greetingTimeout: limits.connectMs,
    dnsTimeout: limits.connectMs,
    socketTimeout: limits.silenceMs,
    // What is sent is made here: no file and no address is ever read for it.
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  return {
    from,
    async deliver({ subject, text, html }, { name, email }, messageId) {
      let timer: NodeJS.Timeout | undefined;
      const tooLong = new Promise<Delivery>((resolve) => {
        timer = setTimeout(
          () => resolve({ kind: 'away', reason: `The mail server took longer than ${limits.wholeMs / 1000} s.` }),
          limits.wholeMs,
        );
      });
      const sent = transport
        .sendMail({
          from,
          to: { name, address: email },
          subject,
          text,
          html,
          messageId,
          // RFC 3834: nobody's holiday notice is to answer.
          headers: { 'Auto-Submitted': 'auto-generated' },
        })
        .then((): Delivery => ({ kind: 'accepted' }), deliveryOfError);
      try {
        return await Promise.race([sent, tooLong]);
      } finally {
        clearTimeout(timer);
      }
    },
  };
}
