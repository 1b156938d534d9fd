import { and, asc, eq } from 'drizzle-orm';
import type { Database } from '../client';
import { budgetCases } from '../schema/budgets';
import { people } from '../schema/people';

export interface BudgetCase {
  id: string;
  name: string;
  /** The query of the address. */
  question: string;
}

const columns = { id: budgetCases.id, name: budgetCases.name, question: budgetCases.question };

export const listBudgetCases = (db: Database, personId: string): Promise<BudgetCase[]> =>
  db.select(columns).from(budgetCases).where(eq(budgetCases.personId, personId)).orderBy(asc(budgetCases.name));

/** Anyone who has the link may open it; it is hard to guess. */
export async function findBudgetCase(db: Database, id: string): Promise<(BudgetCase & { owner: string }) | null> {
  const [row] = await db
    .select({ ...columns, owner: people.name })
    .from(budgetCases)
    .innerJoin(people, eq(people.id, budgetCases.personId))
    .where(eq(budgetCases.id, id));
  return row ?? null;
}

/** A case of the same name is written over. */
export async function keepBudgetCase(db: Database, personId: string, name: string, question: string): Promise<string> {
  const [row] = await db
    .insert(budgetCases)
    .values({ personId, name, question })
    .onConflictDoUpdate({ target: [budgetCases.personId, budgetCases.name], set: { question } })
    .returning({ id: budgetCases.id });
  if (!row) throw new Error('keepBudgetCase: the kept row did not come back');
  return row.id;
}

/** False where it is gone already, or another's. */
export async function deleteBudgetCase(db: Database, personId: string, id: string): Promise<boolean> {
  const gone = await db
    .delete(budgetCases)
    .where(and(eq(budgetCases.id, id), eq(budgetCases.personId, personId)))
    .returning({ id: budgetCases.id });
  return gone.length === 1;
}
