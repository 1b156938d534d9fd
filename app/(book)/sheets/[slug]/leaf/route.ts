import { formulaHtml } from '@/components/math/formula-html';
import { db } from '@/db/client';
import { findSheet } from '@/db/queries/entries';
import { boundSentences } from '@/lib/facts/bound-texts';
import { drawingOf } from '@/lib/facts/drawing';
import { Refusal } from '@/lib/refusal';
import { route } from '@/lib/web/route';
import type { LeafView } from '../../../_components/leaf-view';
import { leafPlot } from '../../../_components/leaf-plot';
import { shownKernel } from '../_components/shown-kernel';

/** What the catalog's facing leaf draws of an entry. */
export const GET = route<{ slug: string }>(async ({ actor, params }) => {
  const sheet = await findSheet(db, actor, params.slug);
  if (!sheet) throw new Refusal('not-found', `There is no ${params.slug} in the book that you may see.`);
  const drawing = drawingOf(sheet.definition, sheet.facts, sheet.summary);
  const kernel = await shownKernel(actor, sheet, { language: 'c' });
  const [rule] = drawing.rule;
  const view: LeafView = {
    formula: rule ? formulaHtml(rule) : null,
    sketch: drawing.sketch,
    plot: leafPlot(drawing, sheet.summary),
    caption:
      sheet.facts?.kind === 'scheme' ? boundSentences(sheet.facts.stability).slice(0, 2).join(' ') || null : null,
    kernel: kernel.kind === 'kernel' ? { address: kernel.address } : { none: kernel.reason },
  };
  return Response.json(view, { headers: { 'Cache-Control': 'private, no-cache' } });
});
