import { revalidatePath } from 'next/cache';
import { z } from 'zod';
import { ACCEPTED, ATTACHMENT_BYTES_MAX } from '@/lib/attachments/attachment';
import { attachFile, refuseUnlessAttachable } from '@/lib/attachments/attach-file';
import { Refusal } from '@/lib/refusal';
import { limitedBody } from '@/lib/web/limited-body';
import { route } from '@/lib/web/route';

const Query = z.object({ revision: z.uuid(), name: z.string().min(1).max(400) });

/** `POST /attachments?revision=ID&name=FILE` with the bytes as the body: a file is added to a draft. */
export const POST = route(async ({ actor, request, url }) => {
  const query = Query.safeParse(Object.fromEntries(url.searchParams));
  if (!query.success) throw new Refusal('invalid', 'accepted: ?revision=ID&name=FILE, and the file as the body');
  const { revision, name } = query.data;
  await refuseUnlessAttachable(actor, revision);
  const bytes = await limitedBody(request, ATTACHMENT_BYTES_MAX, `This file is larger than 10 MB; ${ACCEPTED}.`);
  const attached = await attachFile(actor, revision, { name, bytes });
  revalidatePath(`/drafts/${revision}`);
  return Response.json(attached, { status: 201, headers: { 'Cache-Control': 'no-store' } });
});
