import { Head } from '@/components/ui/head';
import { KeysProvider } from '@/components/ui/keys';
import { requireActor } from '@/lib/auth/require-actor';
import { countWaiting } from '@/lib/reviews/count-waiting';
import { leaveEverywhere } from '../(book)/actions';

/** The frame of the review desk: maintainers decide there, contributors answer. */
export default async function DeskLayout({ children }: { children: React.ReactNode }) {
  const actor = await requireActor('contributor');
  return (
    <KeysProvider>
      <Head actor={actor} waiting={await countWaiting(actor)} signOutEverywhere={leaveEverywhere} />
      <main className="wrap" id="content" tabIndex={-1}>
        {children}
      </main>
    </KeysProvider>
  );
}
