'use client';

import { useEffect, useState } from 'react';

interface CopyButtonProps {
  id?: string;
  className: string;
  /** The text to copy; fetched when the button is pressed. */
  textOf: () => string | Promise<string>;
  children: React.ReactNode;
}

const SHOWN_MS = 2400;

/** Puts a text on the clipboard and says so in its own place. */
export function CopyButton({ id, className, textOf, children }: CopyButtonProps) {
  const [said, setSaid] = useState<string | null>(null);
  useEffect(() => {
    if (said === null) return;
    const timer = setTimeout(() => setSaid(null), SHOWN_MS);
    return () => clearTimeout(timer);
  }, [said]);

  const copy = async () => {
    try {
      await navigator.clipboard.writeText(await textOf());
      setSaid('Copied');
    } catch (fault) {
      setSaid(fault instanceof Error && fault.name === 'Error' ? fault.message : 'The browser did not allow copying');
    }
  };
  return (
    <button type="button" id={id} className={className} onClick={copy}>
      <span aria-live="polite">{said ?? children}</span>
    </button>
  );
}
