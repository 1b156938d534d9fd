/**
 * Before every page: a fresh nonce and the policy that goes with it, the path for whoever sends the reader to
 * sign in, and a redirect where there is no session at all. It is a convenience: whether a session still
 * counts, and for what, is asked of the database by pages, actions and handlers themselves.
 */
import { getToken } from 'next-auth/jwt';
import { type NextRequest, NextResponse } from 'next/server';
import { contentSecurityPolicy } from '@/lib/web/content-security-policy';

// Sign-in, what leads to it, and addresses whose own frames answer programs with a problem document.
const OPEN = /^\/(sign-in|invitation|reset|api|kernels)(\/|$)/;

export async function proxy(request: NextRequest) {
  const { pathname, search } = request.nextUrl;
  if (!OPEN.test(pathname) && !(await getToken({ req: request, secret: process.env.NEXTAUTH_SECRET }))) {
    const target = new URL('/sign-in', request.url);
    if (pathname + search !== '/') target.searchParams.set('callbackUrl', pathname + search);
    return NextResponse.redirect(target);
  }

  const nonce = Buffer.from(crypto.randomUUID()).toString('base64');
  const policy = contentSecurityPolicy(nonce, process.env.NODE_ENV === 'development');
  const headers = new Headers(request.headers);
  headers.set('x-nonce', nonce);
  headers.set('x-path', pathname + search);
  headers.set('content-security-policy', policy);
  const response = NextResponse.next({ request: { headers } });
  response.headers.set('content-security-policy', policy);
  return response;
}

export const config = {
  // Files of the build and of public/ need no policy. Attachments have their own, and a body that passed through here
  // would be cut at 10 MB without a word.
  matcher: ['/((?!_next/static|_next/image|favicon.ico|icon.svg|robots.txt|attachments(?:/|$)).*)'],
};
