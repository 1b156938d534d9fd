'use client';

import type { Route } from 'next';
import Link from 'next/link';
import { usePathname } from 'next/navigation';
import type { Role } from '@/lib/people/role';
import { currentTool, toolsFor } from './tools';

export function ToolList({ role }: { role: Role }) {
  const current = currentTool(usePathname());
  return toolsFor(role).map((tool) => (
    <Link key={tool.href} href={tool.href as Route} aria-current={tool === current ? 'page' : undefined}>
      {tool.name}
    </Link>
  ));
}
