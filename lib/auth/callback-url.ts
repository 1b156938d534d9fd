/**
 * Where to go after signing in: a path of this site, or the catalog. An address of another site, also in the
 * forms //host and /\host that browsers take for one, is not followed.
 */
export function safeCallbackUrl(wish: string | null | undefined): string {
  if (!wish || wish.length > 500 || !/^\/(?![/\\])/.test(wish)) return '/';
  // Browsers drop tabs and line breaks from addresses, which would make "/\t/host" two slashes.
  if ([...wish].some((character) => character.charCodeAt(0) < 32)) return '/';
  return wish === '/sign-in' || /^\/sign-in[?/#]/.test(wish) ? '/' : wish;
}
