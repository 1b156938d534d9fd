import 'server-only';
import { db } from '@/db/client';
import { deleteBudgetCase, keepBudgetCase, listBudgetCases } from '@/db/queries/budget-cases';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { CASES_MAX } from './case-input';

/** Keeps a run by name for this person; one of the same name is written over. @returns its id, which is its link */
export async function keepCase(actor: Actor, name: string, question: string): Promise<string> {
  const kept = await listBudgetCases(db, actor.id);
  if (kept.length >= CASES_MAX && !kept.some((one) => one.name === name))
    throw new Refusal('too-many', `You keep ${CASES_MAX} cases already. Take one out first.`);
  return keepBudgetCase(db, actor.id, name, question);
}

export async function dropCase(actor: Actor, id: string): Promise<void> {
  if (!(await deleteBudgetCase(db, actor.id, id))) throw new Refusal('not-found', 'There is no such case of yours.');
}
