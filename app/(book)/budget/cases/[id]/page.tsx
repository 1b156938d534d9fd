import type { Route } from 'next';
import { notFound, redirect } from 'next/navigation';
import { z } from 'zod';
import { db } from '@/db/client';
import { findBudgetCase } from '@/db/queries/budget-cases';
import { requireActor } from '@/lib/auth/require-actor';

/** The link of a kept case: leads to the run itself. */
export default async function BudgetCasePage({ params }: PageProps<'/budget/cases/[id]'>) {
  await requireActor();
  const { id } = await params;
  const found = z.uuid().safeParse(id).success ? await findBudgetCase(db, id) : null;
  if (!found) notFound();
  const query = new URLSearchParams(found.question);
  query.set('case', found.name);
  redirect(`/budget?${query}` as Route);
}
