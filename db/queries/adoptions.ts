import { and, eq, isNull } from 'drizzle-orm';
import type { Database } from '../client';
import { adoptions } from '../schema/adoptions';

export async function insertAdoption(
  db: Database,
  adoption: { revisionId: string; personId: string; code: string; purpose: string },
) {
  await db.insert(adoptions).values(adoption);
}

export async function isAdopted(db: Database, revisionId: string, code: string): Promise<boolean> {
  const rows = await db
    .select({ id: adoptions.id })
    .from(adoptions)
    .where(and(eq(adoptions.revisionId, revisionId), eq(adoptions.code, code), isNull(adoptions.endedAt)));
  return rows.length > 0;
}
