'use client';

import type { Route } from 'next';
import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { TOOLS, currentTool } from './tools';

export function ToolList() {
  const current = currentTool(usePathname());
  return TOOLS.map((tool) => (
    <Link key={tool.href} href={tool.href as Route} aria-current={tool === current ? 'page' : undefined}>
      {tool.name}
    </Link>
  ));
}
