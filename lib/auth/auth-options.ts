import 'server-only';
import type { NextAuthOptions } from 'next-auth';
import CredentialsProvider from 'next-auth/providers/credentials';
import { db } from '@/db/client';
import { endSession, insertSession } from '@/db/queries/sessions';
import { env } from '@/lib/env';
import { safeCallbackUrl } from './callback-url';
import { networkAddress } from './network-address';
import { signIn } from './sign-in';
import { signInCode } from './sign-in-answer';

/** A function, since a build loads every module without any setting at hand. */
export function authOptions(): NextAuthOptions {
  const { NEXTAUTH_SECRET, LEVELBOOK_DEMO } = env();
  // Workers and the seed do without; whoever signs sessions does not.
  if (!NEXTAUTH_SECRET)
    throw new Error('NEXTAUTH_SECRET is missing: nobody can sign in. `.env.example` says what it is.');
  return {
    secret: NEXTAUTH_SECRET,
    session: { strategy: 'jwt', maxAge: 7 * 24 * 3600 },
    pages: { signIn: '/sign-in', error: '/sign-in' },
    providers: [
      CredentialsProvider({
        credentials: { email: { type: 'email' }, password: { type: 'password' } },
        async authorize(credentials, request) {
          const headers = new Headers(request.headers);
          const address = networkAddress(headers);
          const outcome = await signIn(
            db,
            { email: String(credentials?.email ?? ''), password: String(credentials?.password ?? ''), address },
            LEVELBOOK_DEMO,
          );
          // next-auth hands the message of an error to the page as ?error=…
          if (outcome.kind !== 'signed-in') throw new Error(signInCode(outcome));
          const { personId, sessionVersion } = outcome.claim;
          const userAgent = (headers.get('user-agent') ?? '').slice(0, 300);
          const sessionId = await insertSession(db, { personId, userAgent, address });
          return { id: personId, sessionVersion, sessionId };
        },
      }),
    ],
    events: {
      async signOut({ token }) {
        // The cookie is gone either way; where the database is away, the row runs out by itself.
        if (token.sub && token.sessionId) await endSession(db, token.sub, token.sessionId).catch(() => undefined);
      },
    },
    callbacks: {
      jwt: ({ token, user }) =>
        user ? { sub: user.id, sessionVersion: user.sessionVersion, sessionId: user.sessionId } : token,
      session: ({ session, token }) => ({
        expires: session.expires,
        claim: {
          personId: token.sub ?? '',
          sessionVersion: token.sessionVersion,
          ...(token.sessionId && { sessionId: token.sessionId }),
        },
      }),
      redirect({ url, baseUrl }) {
        const path = url.startsWith(`${baseUrl}/`) ? url.slice(baseUrl.length) : url;
        return baseUrl + safeCallbackUrl(path);
      },
    },
  };
}
