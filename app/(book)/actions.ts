'use server';

import { z } from 'zod';
import { signOutEverywhere } from '@/lib/auth/sign-out-everywhere';
import { action } from '@/lib/web/action';

const endSessions = action(z.object({}), (actor) => signOutEverywhere(actor));

/** Ends the reader's sessions in every browser. */
export async function leaveEverywhere(): Promise<{ message: string | null }> {
  const answer = await endSessions({});
  return { message: answer.ok ? null : answer.message };
}
