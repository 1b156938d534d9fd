import { leaveEverywhere } from '@/app/(book)/actions';
import { Head } from '@/components/ui/head';
import { KeysProvider } from '@/components/ui/keys';
import { requireActor } from '@/lib/auth/require-actor';

/** The frame of the pages that keep the house. */
export default async function HouseLayout({ children }: { children: React.ReactNode }) {
  const actor = await requireActor();
  return (
    <KeysProvider>
      <Head actor={actor} signOutEverywhere={leaveEverywhere} />
      <main className="wrap house" id="content" tabIndex={-1}>
        {children}
      </main>
    </KeysProvider>
  );
}
