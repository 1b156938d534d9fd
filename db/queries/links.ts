/** Links that letters carry. Only the hash of a secret is ever kept or looked for. */
import { and, eq, gt, isNull, sql } from 'drizzle-orm';
import type { LinkPurpose } from '@/lib/people/link';
import type { Database } from '../client';
import { links, people } from '../schema/people';

export async function insertLink(
  db: Database,
  { purpose, personId, hash, hours }: { purpose: LinkPurpose; personId: string; hash: string; hours: number },
) {
  await db.insert(links).values({ purpose, personId, hash, expiresAt: sql`now() + make_interval(hours => ${hours})` });
}

const inForce = (purpose: LinkPurpose, hash: string) =>
  and(eq(links.purpose, purpose), eq(links.hash, hash), isNull(links.endedAt), gt(links.expiresAt, sql`now()`));

/** Whose link it is, without using it; null where it does not serve, or its person has no open account. */
export async function findLink(db: Database, purpose: LinkPurpose, hash: string) {
  const [row] = await db
    .select({ personId: people.id, name: people.name, email: people.email, role: people.role, demo: people.demo })
    .from(links)
    .innerJoin(people, eq(people.id, links.personId))
    .where(and(inForce(purpose, hash), isNull(people.disabledAt)));
  return row ?? null;
}

/** Uses a link up: of several that come at once, one is served. @returns whose it was */
export async function takeLink(tx: Database, purpose: LinkPurpose, hash: string): Promise<string | null> {
  const [row] = await tx
    .update(links)
    .set({ endedAt: sql`now()` })
    .where(inForce(purpose, hash))
    .returning({ personId: links.personId });
  return row?.personId ?? null;
}

/** Puts the links of a person out of force; of every purpose unless one is given. */
export async function endLinks(tx: Database, personId: string, purpose?: LinkPurpose): Promise<void> {
  await tx
    .update(links)
    .set({ endedAt: sql`now()` })
    .where(and(eq(links.personId, personId), isNull(links.endedAt), purpose && eq(links.purpose, purpose)));
}
