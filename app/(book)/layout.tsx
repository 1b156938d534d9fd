import { Head } from '@/components/ui/head';
import { KeysProvider } from '@/components/ui/keys';
import { requireActor } from '@/lib/auth/require-actor';
import { countWaiting } from '@/lib/reviews/count-waiting';
import { leaveEverywhere } from './actions';

/** The frame of every page for those who are signed in. */
export default async function BookLayout({ children }: { children: React.ReactNode }) {
  const actor = await requireActor();
  return (
    <KeysProvider>
      <Head actor={actor} waiting={await countWaiting(actor)} signOutEverywhere={leaveEverywhere} />
      <main className="wrap" id="content" tabIndex={-1}>
        {children}
      </main>
    </KeysProvider>
  );
}
