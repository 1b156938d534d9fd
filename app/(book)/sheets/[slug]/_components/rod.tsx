'use client';

import { useEffect, useMemo, useState } from 'react';
import { type KeyDeed, useKeys } from '@/components/ui/keys';

export interface SheetPart {
  readonly id: string;
  readonly name: string;
}

/** An E-block of the staff, tall as its part of the rod; ink and red in turn, as on a levelling staff. */
function StaffBlock({ figure }: { figure: number }) {
  const isInk = figure % 2 === 1;
  const look = isInk ? 'r-ink' : 'r-red';
  return (
    <svg aria-hidden="true">
      <rect width="40" height="100%" className="r-leaf" />
      {[0, 1, 2, 3, 4].map((tenth) => {
        const width = tenth % 2 === 0 ? 24 : 8;
        return (
          <rect
            key={tenth}
            x={isInk ? 0 : 40 - width}
            y={`${tenth * 10}%`}
            width={width}
            height="10.4%"
            className={look}
          />
        );
      })}
      <text x="20" y="86%" textAnchor="middle" className={look}>
        {figure}
      </text>
      <path d="M0 0V2000M40 0V2000" className="r-edge" />
      <path d="M0 .5H40" className="r-line" />
    </svg>
  );
}

/** The staff as the table of contents of a sheet; `[` and `]` and the figures walk it. */
export function Rod({ parts }: { parts: readonly SheetPart[] }) {
  const [current, setCurrent] = useState(0);

  useEffect(() => {
    const onScroll = () => {
      const line = window.innerHeight * 0.35;
      const passed = parts.findLastIndex(
        ({ id }) => (document.getElementById(id)?.getBoundingClientRect().top ?? Infinity) <= line,
      );
      const atEnd = window.innerHeight + window.scrollY >= document.documentElement.scrollHeight - 4;
      setCurrent(atEnd && window.scrollY > 0 ? parts.length - 1 : Math.max(0, passed));
    };
    onScroll();
    window.addEventListener('scroll', onScroll, { passive: true });
    return () => window.removeEventListener('scroll', onScroll);
  }, [parts]);

  const deeds = useMemo<KeyDeed[]>(() => {
    const go = (index: number) => {
      const part = document.getElementById(parts[Math.max(0, Math.min(parts.length - 1, index))]?.id ?? '');
      part?.scrollIntoView();
      part?.focus({ preventScroll: true });
    };
    return [
      { keys: ['['], label: 'Part before', run: () => go(current - 1) },
      { keys: [']'], label: 'Next part', run: () => go(current + 1) },
      ...parts.map((part, index) => ({ keys: [String(index + 1)], label: part.name, run: () => go(index) })),
      { keys: ['c'], label: 'Copy the kernel shown', run: () => document.getElementById('copy-kernel')?.click() },
    ];
  }, [parts, current]);
  useKeys(deeds);

  return (
    <nav className="rod" aria-label="Parts of the sheet">
      <ol>
        {parts.map((part, index) => (
          <li key={part.id} aria-current={index === current ? 'true' : undefined}>
            <StaffBlock figure={index + 1} />
            <a href={`#${part.id}`}>
              <i>{index + 1}</i>
              <span>{part.name}</span>
            </a>
          </li>
        ))}
      </ol>
    </nav>
  );
}
