import 'server-only';
import { notFound } from 'next/navigation';
import { requireActor } from '@/lib/auth/require-actor';
import { env } from '@/lib/env';

/**
 * For the pages of caught letters: administrators only, since whoever reads a letter can follow its link; and only
 * where the local catcher runs, elsewhere there is no such page.
 */
export async function requireCatcher(): Promise<void> {
  await requireActor('administrator');
  if (!env().LEVELBOOK_MAIL_CATCHER) notFound();
}
