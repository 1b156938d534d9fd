import { describe, expect, it } from 'vitest';
import { limitedBody } from '@/lib/web/limited-body';

const request = (body: BodyInit | null, headers: Record<string, string> = {}) =>
  new Request('http://levelbook.example/attachments', { method: 'POST', body, headers, duplex: 'half' } as RequestInit);

describe('a body that may have ten bytes', () => {
  it('is given whole', async () => {
    expect((await limitedBody(request('0123456789'), 10, 'too large')).toString()).toBe('0123456789');
    expect(await limitedBody(request(null), 10, 'too large')).toHaveLength(0);
  });
  it('is refused by what it says of itself, before anything is read', async () => {
    let isRead = false;
    const body = new ReadableStream(
      {
        pull: (controller) => {
          isRead = true;
          controller.close();
        },
      },
      { highWaterMark: 0 },
    );
    await expect(limitedBody(request(body, { 'content-length': '11' }), 10, 'too large')).rejects.toThrow('too large');
    expect(isRead).toBe(false);
  });
  it('is refused where it turns out longer, and the rest is not read', async () => {
    let chunks = 0;
    const body = new ReadableStream<Uint8Array>(
      {
        pull: (controller) => {
          chunks++;
          controller.enqueue(new Uint8Array(4));
        },
      },
      { highWaterMark: 0 },
    );
    await expect(limitedBody(request(body), 10, 'too large')).rejects.toThrow('too large');
    expect(chunks).toBeLessThanOrEqual(4);
  });
});
