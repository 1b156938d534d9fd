'use client';

import { type ReactNode, createContext, use, useState } from 'react';
import { Options } from '@/components/ui/options';

const WORDS = { struck: 'struck', new: 'new', old: 'old' };
type Shown = keyof typeof WORDS;

const ShownContext = createContext<{ shown: Shown; setShown: (shown: Shown) => void }>({
  shown: 'struck',
  setShown: () => {},
});

/** The frame of a page of corrections: all of them are shown struck, as they are now, or as they were. */
export function Corrections({ className, children }: { className?: string; children: ReactNode }) {
  const [shown, setShown] = useState<Shown>('struck');
  return (
    <ShownContext value={{ shown, setShown }}>
      <div className={className} data-shown={shown}>
        {children}
      </div>
    </ShownContext>
  );
}

/** The choice for the whole frame; it may stand in it more than once. */
export function ShowChoice() {
  const { shown, setShown } = use(ShownContext);
  return <Options title="Show" words={WORDS} value={shown} onValue={(value) => setShown(value as Shown)} />;
}
