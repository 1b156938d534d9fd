/**
 * The policy of a page: scripts by nonce only. Styles may be inline, since the server-drawn formulas carry them.
 * @param nonce      fresh for each request
 * @param developing the development build evaluates code and opens a socket to its own server
 */
export function contentSecurityPolicy(nonce: string, developing: boolean): string {
  return [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${developing ? " 'unsafe-eval'" : ''}`,
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "font-src 'self'",
    `connect-src 'self'${developing ? ' ws: wss:' : ''}`,
    "worker-src 'self' blob:",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join('; ');
}
