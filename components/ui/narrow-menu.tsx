'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { useRef } from 'react';
import type { Role } from '@/lib/people/role';
import { KeyListButton } from './keys';
import { type SignOutEverywhere, SignOutButtons } from './sign-out-buttons';
import { ThemeButton } from './theme-button';
import { ToolList } from './tool-list';
import { currentTool } from './tools';
import { useDismissal } from './use-dismissal';

interface NarrowMenuProps {
  name: string;
  role: Role;
  waiting?: Readonly<Record<string, number>>;
  signOutEverywhere: SignOutEverywhere;
}

/** Below 700 px the tools fold into one button that carries the name of the open one. */
export function NarrowMenu({ name, role, waiting, signOutEverywhere }: NarrowMenuProps) {
  const menu = useRef<HTMLDetailsElement>(null);
  const path = usePathname();
  useDismissal(menu);
  return (
    <details className="menu" ref={menu}>
      <summary>
        {currentTool(path)?.name ?? 'Tools'} <span aria-hidden="true">▾</span>
      </summary>
      <div className="panel">
        <nav aria-label="Tools" onClick={() => menu.current?.removeAttribute('open')}>
          <ToolList role={role} waiting={waiting} />
        </nav>
        <ThemeButton />
        <p className="lab">
          {name}, {role}
        </p>
        <Link href="/profile">Your profile</Link>
        <KeyListButton />
        <SignOutButtons signOutEverywhere={signOutEverywhere} />
      </div>
    </details>
  );
}
