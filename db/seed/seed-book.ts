import type { DemoEntry } from './demo-entry';
import { seedEntry } from './seed-entry';
import { seedPeople } from './seed-people';

/**
 * The demo's people and these entries, as far as they are missing. An entry that cannot be had is named with
 * the reason, and keeps nobody from the others.
 * @param say takes one line of news at a time
 */
export async function seedBook(entries: readonly DemoEntry[], say: (line: string) => void) {
  const people = await seedPeople();
  if (people > 0) say(`${people} people`);
  let added = 0;
  const troubles: string[] = [];
  for (const entry of entries) {
    try {
      if (!(await seedEntry(entry))) continue;
      added += 1;
      if (added % 20 === 0) say(`${added} of ${entries.length} entries`);
    } catch (error) {
      const reason = error instanceof Error ? error.message : String(error);
      troubles.push(`${entry.letters} ${entry.number} ${entry.slug}: ${reason}`);
      say(troubles.at(-1) ?? reason);
    }
  }
  say(added === 0 ? 'nothing was missing' : `${added} entries with their facts; the worker tries them now`);
  return { people, added, troubles };
}
