'use client';

import { useRef } from 'react';

interface TabsProps<V extends string> {
  label: string;
  /** Id of the panel that the tabs turn. */
  panel: string;
  options: readonly { readonly value: V; readonly label: string }[];
  value: V;
  onValue: (value: V) => void;
}

/** Words above a thin tube, one of them between ticks; arrows, Home and End walk them. */
export function Tabs<V extends string>({ label, panel, options, value, onValue }: TabsProps<V>) {
  const list = useRef<HTMLDivElement>(null);
  const walk = (event: React.KeyboardEvent) => {
    const at = options.findIndex((option) => option.value === value);
    const target = { ArrowRight: at + 1, ArrowLeft: at - 1, Home: 0, End: options.length - 1 }[event.key];
    const next = target === undefined ? undefined : options[(target + options.length) % options.length];
    if (!next) return;
    event.preventDefault();
    onValue(next.value);
    list.current?.querySelector<HTMLElement>(`[data-value="${next.value}"]`)?.focus();
  };
  return (
    <div className="tablist" role="tablist" aria-label={label} ref={list} onKeyDown={walk}>
      {options.map((option) => (
        <button
          key={option.value}
          type="button"
          role="tab"
          data-value={option.value}
          className={option.value === value ? 't on' : 't'}
          aria-selected={option.value === value}
          aria-controls={panel}
          tabIndex={option.value === value ? 0 : -1}
          onClick={() => onValue(option.value)}
        >
          {option.label}
        </button>
      ))}
    </div>
  );
}
