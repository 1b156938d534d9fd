'use client';

import { useId } from 'react';

interface OptionsProps {
  title: string;
  /** Value to word. */
  words: Readonly<Record<string, string>>;
  value: string;
  onValue: (value: string) => void;
}

/** Options are words in a row; the one in force is underlined. A single one is only told. */
export function Options({ title, words, value, onValue }: OptionsProps) {
  const name = useId();
  const all = Object.entries(words);
  if (all.length === 1) {
    return (
      <span>
        {title} <b>{all[0]?.[1]}</b>
      </span>
    );
  }
  return (
    <span className="wordset" role="radiogroup" aria-label={title}>
      {title}
      {all.map(([one, word]) => (
        <label key={one} className={one === value ? 'on' : undefined}>
          <input type="radio" name={name} value={one} checked={one === value} onChange={() => onValue(one)} />
          {word}
        </label>
      ))}
    </span>
  );
}
