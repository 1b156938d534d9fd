/** Whether If-None-Match of a request names the ETag of the answer (RFC 9110, section 13.1.2: weak comparison). */
export function isNotModified(request: Request, answer: Headers): boolean {
  const wanted = request.headers.get('if-none-match');
  const etag = answer.get('etag');
  if (!wanted || !etag) return false;
  const bare = (tag: string) => tag.trim().replace(/^W\//, '');
  return wanted.trim() === '*' || wanted.split(',').some((tag) => bare(tag) === bare(etag));
}
