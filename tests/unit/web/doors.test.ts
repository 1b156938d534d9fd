import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { Refusal } from '@/lib/refusal';
import { answerOfError } from '@/lib/web/answer-of-error';
import { contentSecurityPolicy } from '@/lib/web/content-security-policy';
import { DatabaseAway } from '@/lib/web/database-away';
import { fieldMessages, objectOfForm } from '@/lib/web/form-input';
import { isNotModified } from '@/lib/web/not-modified';
import { problem } from '@/lib/web/problem';
import { isFromHere } from '@/lib/web/same-origin';

describe('what a reader is told of an error', () => {
  it('is a refusal in its own words', () => {
    expect(answerOfError('test', new Refusal('conflict', 'Changed.', { title: 'taken' }))).toEqual({
      code: 'conflict',
      message: 'Changed.',
      fields: { title: 'taken' },
    });
  });

  it('is never the text of a fault, only the mark under which the log has it', () => {
    const written: string[] = [];
    const write = process.stderr.write.bind(process.stderr);
    process.stderr.write = (text: string | Uint8Array) => written.push(String(text)) > 0;
    const answer = answerOfError('test', new Error('password=hunter2'));
    process.stderr.write = write;
    expect(answer.code).toBe('fault');
    expect(answer.message).not.toContain('hunter2');
    const mark = /under (\w+)\./.exec(answer.message)?.[1];
    expect(written.join('')).toContain(`"fault":"${mark}"`);
    expect(written.join('')).toContain('hunter2');
  });

  it('is that the database is away, with a digest for the error page', () => {
    const away = new DatabaseAway(new Error('connect ECONNREFUSED'));
    expect(away.digest).toBe('database-away');
    expect(answerOfError('test', away)).toMatchObject({ code: 'unavailable' });
  });
});

describe('a problem document', () => {
  it('has the status that belongs to its code and the media type of RFC 9457', async () => {
    const answer = problem('invalid', 'Option precision cannot be "half".', { precision: 'accepted: double' });
    expect(answer.status).toBe(422);
    expect(answer.headers.get('content-type')).toBe('application/problem+json');
    expect(await answer.json()).toEqual({
      type: 'about:blank',
      title: 'Cannot be read as it stands',
      status: 422,
      detail: 'Option precision cannot be "half".',
      code: 'invalid',
      fields: { precision: 'accepted: double' },
    });
  });

  it.each([
    ['not-signed-in', 401],
    ['not-allowed', 403],
    ['not-found', 404],
    ['conflict', 409],
    ['too-many', 429],
    ['unavailable', 503],
    ['fault', 500],
  ] as const)('for %s has status %i', (code, status) => {
    expect(problem(code, 'Why.').status).toBe(status);
  });

  it('says when to come back', () => {
    expect(problem('unavailable', 'Why.').headers.get('retry-after')).toBe('5');
    expect(problem('not-found', 'Why.').headers.get('retry-after')).toBeNull();
  });
});

describe('the input of a form', () => {
  it('is an object, with a list where a name comes more than once', () => {
    const form = new FormData();
    form.append('$ACTION_ID_1', '');
    form.append('sentence', 'Right.');
    form.append('points', 'facts');
    form.append('points', 'naming');
    expect(objectOfForm(form)).toEqual({ sentence: 'Right.', points: ['facts', 'naming'] });
  });

  it('is refused field by field, with the first message of each', () => {
    const schema = z.object({ title: z.string().min(2, 'too short').regex(/z/, 'no z'), terms: z.array(z.int()) });
    const parsed = schema.safeParse({ title: 'a', terms: [1, 0.5] });
    if (parsed.success) throw new Error('it should not parse');
    expect(fieldMessages(parsed.error)).toEqual({ title: 'too short', 'terms.1': expect.any(String) });
  });
});

describe('the policy of a page', () => {
  it('lets scripts run by nonce only, and no page frame ours', () => {
    const policy = contentSecurityPolicy('abc', false);
    expect(policy).toContain("script-src 'self' 'nonce-abc' 'strict-dynamic';");
    expect(policy).toContain("frame-ancestors 'none'");
    expect(policy).not.toContain('unsafe-eval');
  });

  it('lets the development build evaluate code', () => {
    expect(contentSecurityPolicy('abc', true)).toContain("'unsafe-eval'");
  });
});

describe('a request that changes something', () => {
  const request = (method: string, headers: Record<string, string>) =>
    new Request('http://book.example/kernels', { method, headers: { host: 'book.example', ...headers } });

  it.each([
    ['our own page', { 'sec-fetch-site': 'same-origin' }, true],
    ['our own page in an older browser', { origin: 'http://book.example' }, true],
    ['a program', {}, true],
    ['another site', { 'sec-fetch-site': 'cross-site' }, false],
    ['a sibling of our site', { 'sec-fetch-site': 'same-site' }, false],
    ['another site in an older browser', { origin: 'http://elsewhere.example' }, false],
    ['a page without an origin', { origin: 'null' }, false],
  ])('from %s', (_, headers, accepted) => {
    expect(isFromHere(request('POST', headers))).toBe(accepted);
    expect(isFromHere(request('GET', headers))).toBe(true);
  });
});

describe('If-None-Match', () => {
  const ask = (wanted: string | null) =>
    isNotModified(
      new Request('http://book.example', wanted === null ? {} : { headers: { 'if-none-match': wanted } }),
      new Headers({ etag: '"abc"' }),
    );
  it.each([
    ['"abc"', true],
    ['W/"abc"', true],
    ['"x", "abc"', true],
    ['*', true],
    ['"x"', false],
    ['abc', false],
    [null, false],
  ])('%s', (wanted, same) => expect(ask(wanted)).toBe(same));
});
