import { createHash } from 'node:crypto';
import type { KernelLanguage } from '@/lib/codegen/kernel-request';
import { getKernel } from '@/lib/kernels/get-kernel';
import { readKernelAddress } from '@/lib/kernels/kernel-address';
import { isNotModified } from '@/lib/web/not-modified';
import { problem } from '@/lib/web/problem';
import { route } from '@/lib/web/route';

const MEDIA_TYPE: Readonly<Record<KernelLanguage, string>> = {
  c: 'text/x-c; charset=utf-8',
  fortran: 'text/x-fortran; charset=utf-8',
  python: 'text/x-python; charset=utf-8',
};

/** A kernel as a file. Its ETag is the text's own hash: when entry, options and generator stay, so does it. */
export const GET = route<{ slug: string; revision: string; file: string }>(async ({ actor, request, url, params }) => {
  const read = readKernelAddress(params, url.searchParams);
  if (!read.ok) return problem('invalid', read.message, read.fields);
  const { kernel, state, warning } = await getKernel(actor, read.address);

  const headers = new Headers({
    'Content-Type': MEDIA_TYPE[kernel.language],
    'Content-Disposition': `inline; filename="${kernel.fileName}"`,
    ETag: `"${createHash('sha256').update(kernel.source).digest('base64url')}"`,
    // Kept by the reader's own cache only, and asked for again: the revision may have been withdrawn since.
    'Cache-Control': 'private, no-cache',
    'Levelbook-State': state,
  });
  if (warning) headers.set('Levelbook-Warning', warning);
  if (isNotModified(request, headers)) return new Response(null, { status: 304, headers });
  return new Response(kernel.source, { headers });
});
