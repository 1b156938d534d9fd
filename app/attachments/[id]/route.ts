import { z } from 'zod';
import { getAttachment } from '@/lib/attachments/get-attachment';
import { Refusal } from '@/lib/refusal';
import { route } from '@/lib/web/route';

/** A file as a download, never as a page: a drawing may carry scripts, and none of them runs here. */
export const GET = route<{ id: string }>(async ({ actor, params }) => {
  if (!z.uuid().safeParse(params.id).success) throw new Refusal('not-found', 'There is no such attachment.');
  const { name, type, sha256, bytes } = await getAttachment(actor, params.id);
  const plain = name.replace(/[^\x20-\x7E]/g, '_');
  return new Response(new Uint8Array(bytes), {
    headers: {
      'Content-Type': type === 'text/csv' ? 'text/csv; charset=utf-8' : type,
      'Content-Length': String(bytes.length),
      'Content-Disposition': `attachment; filename="${plain}"; filename*=UTF-8''${encodeURIComponent(name)}`,
      'Content-Security-Policy': "default-src 'none'; sandbox",
      'Cache-Control': 'private, max-age=31536000, immutable',
      ETag: `"${sha256}"`,
    },
  });
});
