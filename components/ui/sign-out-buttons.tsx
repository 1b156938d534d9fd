'use client';

import { signOut } from 'next-auth/react';

/** Out of this browser, or out of every browser at once. */
export function SignOutButtons({ signOutEverywhere }: { signOutEverywhere: () => Promise<void> }) {
  const leave = () => signOut({ callbackUrl: '/sign-in' });
  return (
    <>
      <button type="button" onClick={leave}>
        Sign out
      </button>
      <button type="button" onClick={() => signOutEverywhere().then(leave)}>
        Sign out everywhere
      </button>
    </>
  );
}
