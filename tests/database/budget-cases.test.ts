import { beforeAll, describe, expect, it } from 'vitest';
import { findBudgetCase, listBudgetCases } from '@/db/queries/budget-cases';
import { CASES_MAX } from '@/lib/budgets/case-input';
import { dropCase, keepCase } from '@/lib/budgets/keep-case';
import type { Actor } from '@/lib/people/actor';
import { aPerson } from '../support/makers';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();

let reader: Actor;
let other: Actor;
beforeAll(async () => {
  reader = await aPerson('reader');
  other = await aPerson('reader');
});

describe('kept cases', () => {
  it('stand by name, one of the same name written over, and open for anyone with the link', async () => {
    const first = await keepCase(reader, 'Outer Bank', 'scheme=a');
    expect(await keepCase(reader, 'Outer Bank', 'scheme=b')).toBe(first);
    expect(await listBudgetCases(db, reader.id)).toMatchObject([{ name: 'Outer Bank', question: 'scheme=b' }]);
    expect(await findBudgetCase(db, first)).toMatchObject({ question: 'scheme=b', owner: reader.name });
    expect(await listBudgetCases(db, other.id)).toEqual([]);
  });

  it('are taken out by their own person only', async () => {
    const id = await keepCase(reader, 'Inner basin', 'scheme=c');
    await expect(dropCase(other, id)).rejects.toThrow('no such case of yours');
    await dropCase(reader, id);
    expect(await findBudgetCase(db, id)).toBeNull();
  });

  it('are a hundred at most', async () => {
    for (let k = 0; k < CASES_MAX; k++) await keepCase(other, `Case ${k}`, 'scheme=d');
    await expect(keepCase(other, 'One more', 'scheme=d')).rejects.toThrow(/Take one out/);
    await expect(keepCase(other, 'Case 3', 'scheme=e')).resolves.toBeTypeOf('string');
  });
});
