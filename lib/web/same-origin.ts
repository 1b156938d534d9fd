/**
 * Whether a request that changes something comes from our own pages or from a program, not from a page of
 * another site that uses the reader's cookie. Browsers send Sec-Fetch-Site or at least Origin; a program sends
 * neither, and has no cookie that it was not given.
 */
export function isFromHere(request: Request): boolean {
  if (['GET', 'HEAD', 'OPTIONS'].includes(request.method)) return true;
  const site = request.headers.get('sec-fetch-site');
  if (site) return site === 'same-origin' || site === 'none';
  const origin = request.headers.get('origin');
  if (!origin) return true;
  return URL.canParse(origin) && new URL(origin).host === request.headers.get('host');
}
