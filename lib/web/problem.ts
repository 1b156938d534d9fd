import type { RefusalCode } from '@/lib/refusal';

const STATUS: Readonly<Record<RefusalCode | 'fault', number>> = {
  'not-signed-in': 401,
  'not-allowed': 403,
  'not-found': 404,
  conflict: 409,
  invalid: 422,
  'too-many': 429,
  unavailable: 503,
  fault: 500,
};

const TITLE: Readonly<Record<RefusalCode | 'fault', string>> = {
  'not-signed-in': 'An account is needed',
  'not-allowed': 'Not allowed',
  'not-found': 'Not in the book',
  conflict: 'Changed meanwhile',
  invalid: 'Cannot be read as it stands',
  'too-many': 'Too many requests',
  unavailable: 'Not available just now',
  fault: 'Something failed on our side',
};

/** A problem document (RFC 9457) with the status that belongs to its code. */
export function problem(
  code: RefusalCode | 'fault',
  detail: string,
  fields: Readonly<Record<string, string>> = {},
): Response {
  const status = STATUS[code];
  const document = {
    type: 'about:blank',
    title: TITLE[code],
    status,
    detail,
    code,
    ...(Object.keys(fields).length > 0 && { fields }),
  };
  const headers = new Headers({ 'Content-Type': 'application/problem+json', 'Cache-Control': 'no-store' });
  if (status === 503 || status === 429) headers.set('Retry-After', status === 503 ? '5' : '60');
  return new Response(JSON.stringify(document), { status, headers });
}
