'use server';

import { revalidatePath } from 'next/cache';
import { CaseChoice, CaseInput } from '@/lib/budgets/case-input';
import { dropCase as dropCaseOf, keepCase as keepCaseOf } from '@/lib/budgets/keep-case';
import { action } from '@/lib/web/action';

const keepAction = action(CaseInput, async (actor, { name, question }) => {
  const id = await keepCaseOf(actor, name, question);
  revalidatePath('/budget');
  return { id, name };
});
export const keepCase = async (form: FormData) => keepAction(form);

const dropAction = action(CaseChoice, async (actor, { id }) => {
  await dropCaseOf(actor, id);
  revalidatePath('/budget');
});
export const dropCase = async (form: FormData) => dropAction(form);
