import { expect, it } from 'vitest';
import { listLiveTrials } from '@/db/queries/trials';
import { insertWaitingTrial } from '@/db/queries/waiting-trials';
import { queueTrial } from '@/lib/trials/queue-trial';
import { aDraft, aPerson } from '../support/makers';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();

it('takes up what somebody asked for before what the house tries for itself', async () => {
  const author = await aPerson('contributor');
  const [first, second, third] = [await aDraft(author), await aDraft(author), await aDraft(author)];
  await insertWaitingTrial(db, first.id, author.id);
  await insertWaitingTrial(db, second.id, author.id);
  await queueTrial(author, third.id);
  const order = async () => (await listLiveTrials(db)).map(({ revisionId }) => revisionId);
  expect(await order()).toEqual([third.id, first.id, second.id]);

  // The trial that waits already is the one that was asked for now.
  expect(await queueTrial(author, second.id)).toMatchObject({ isNew: false });
  expect(await order()).toEqual([second.id, third.id, first.id]);
});
