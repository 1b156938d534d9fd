'use client';

import { useState, type InputHTMLAttributes } from 'react';

interface HeldInputProps extends Omit<InputHTMLAttributes<HTMLInputElement>, 'value' | 'onChange'> {
  value: string;
  onText: (text: string) => void;
}

/** A field whose text stays as it is typed while it has the focus, even where it stands for something tidier. */
export function HeldInput({ value, onText, onBlur, ...more }: HeldInputProps) {
  const [typed, setTyped] = useState<string | null>(null);
  return (
    <input
      autoComplete="off"
      autoCapitalize="off"
      spellCheck={false}
      {...more}
      value={typed ?? value}
      onChange={(event) => {
        setTyped(event.target.value);
        onText(event.target.value);
      }}
      onBlur={(event) => {
        setTyped(null);
        onBlur?.(event);
      }}
    />
  );
}
