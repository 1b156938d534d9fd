'use client';

import { signOut } from 'next-auth/react';
import { useState } from 'react';

/** Answers with a sentence where it could not be done. */
export type SignOutEverywhere = () => Promise<{ message: string | null }>;

const leave = () => signOut({ callbackUrl: '/sign-in' });

/** Out of this browser, or out of every browser at once. */
export function SignOutButtons({ signOutEverywhere }: { signOutEverywhere: SignOutEverywhere }) {
  const [refusal, setRefusal] = useState<string | null>(null);
  const leaveEverywhere = async () => {
    const { message } = await signOutEverywhere();
    setRefusal(message);
    if (message === null) await leave();
  };
  return (
    <>
      <button type="button" onClick={leave}>
        Sign out
      </button>
      <button type="button" onClick={leaveEverywhere}>
        Sign out everywhere
      </button>
      {refusal && (
        <p className="fail small" role="alert">
          {refusal}
        </p>
      )}
    </>
  );
}
