/**
 * Where a request comes from, for counting tries: the last address of X-Forwarded-For, which the nearest
 * proxy (or Next itself) wrote. Those before it are the client's own word. Without a proxy the client can
 * make up this one too; the limit by e-mail address does not depend on it.
 */
export function networkAddress(headers: Headers): string {
  const last = headers.get('x-forwarded-for')?.split(',').at(-1)?.trim();
  return (last || 'unknown').slice(0, 64);
}
