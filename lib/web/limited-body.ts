import 'server-only';
import { Refusal } from '@/lib/refusal';

/**
 * The body of a request, never more of it than is allowed: what says it is larger is refused before anything is read,
 * what turns out to be larger is refused where it passes the limit.
 * @param most largest number of bytes
 * @param sentence what the reader is told
 */
export async function limitedBody(request: Request, most: number, sentence: string): Promise<Buffer> {
  const said = request.headers.get('content-length');
  if (said !== null && (!/^\d+$/.test(said) || Number(said) > most)) throw new Refusal('invalid', sentence);
  if (!request.body) return Buffer.alloc(0);
  const chunks: Uint8Array[] = [];
  let bytes = 0;
  const reader = request.body.getReader();
  for (let part = await reader.read(); !part.done; part = await reader.read()) {
    bytes += part.value.byteLength;
    if (bytes > most) {
      await reader.cancel();
      throw new Refusal('invalid', sentence);
    }
    chunks.push(part.value);
  }
  return Buffer.concat(chunks, bytes);
}
