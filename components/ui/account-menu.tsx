'use client';

import Link from 'next/link';
import { useRef } from 'react';
import type { Role } from '@/lib/people/role';
import { KeyListButton } from './keys';
import { type SignOutEverywhere, SignOutButtons } from './sign-out-buttons';
import { useDismissal } from './use-dismissal';

interface AccountMenuProps {
  name: string;
  role: Role;
  signOutEverywhere: SignOutEverywhere;
}

/** Who is signed in, and the ways out. */
export function AccountMenu({ name, role, signOutEverywhere }: AccountMenuProps) {
  const menu = useRef<HTMLDetailsElement>(null);
  useDismissal(menu);
  return (
    <details className="account" ref={menu}>
      <summary>{name}</summary>
      <div className="panel">
        <p className="lab">Signed in as {role}</p>
        <Link href="/profile">Your profile</Link>
        <KeyListButton />
        <SignOutButtons signOutEverywhere={signOutEverywhere} />
      </div>
    </details>
  );
}
