'use client';

import type { Route } from 'next';
import Link from 'next/link';
import { usePathname } from 'next/navigation';
import type { Role } from '@/lib/people/role';
import { currentTool, toolsFor } from './tools';

interface ToolListProps {
  role: Role;
  /** How many things wait at a tool, by its address. */
  waiting?: Readonly<Record<string, number>>;
}

export function ToolList({ role, waiting }: ToolListProps) {
  const current = currentTool(usePathname());
  return toolsFor(role).map((tool) => (
    <Link key={tool.href} href={tool.href as Route} aria-current={tool === current ? 'page' : undefined}>
      {tool.name}
      {waiting?.[tool.href] ? (
        <span className="n">
          {waiting[tool.href]}
          <span className="sr"> waiting</span>
        </span>
      ) : null}
    </Link>
  ));
}
