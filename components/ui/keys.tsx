'use client';

import { createContext, useCallback, useContext, useEffect, useMemo, useRef, useState } from 'react';
import { KeyList } from './key-list';
import { useStoredFlag } from './use-stored-flag';

export interface KeyDeed {
  /** Values of KeyboardEvent.key; the first is the one shown in the list. */
  readonly keys: readonly string[];
  readonly label: string;
  readonly run: () => void;
}

interface KeyBook {
  add: (deeds: readonly KeyDeed[]) => () => void;
  /** Opens the list of keys. */
  list: () => void;
}

const Book = createContext<KeyBook | null>(null);

/** Places where a letter is text, or where a key already means something. */
const isTyping = (target: EventTarget | null) =>
  target instanceof HTMLElement && (target.isContentEditable || target.matches('input, textarea, select'));
const OWNERS = '[role="tablist"], [role="slider"], [role="radiogroup"], dialog';
const PRESSED_BY_ENTER = 'a, button, summary';
const hasOwnUse = (target: EventTarget | null, key: string) =>
  target instanceof HTMLElement && target.closest(key === 'Enter' ? `${OWNERS}, ${PRESSED_BY_ENTER}` : OWNERS) !== null;

/** Hears the keys of the page; letters are dead inside fields and can be turned off. */
export function KeysProvider({ children }: { children: React.ReactNode }) {
  const sets = useRef(new Set<readonly KeyDeed[]>());
  const [listed, setListed] = useState<readonly KeyDeed[] | null>(null);
  const [lettersOff, setLettersOff] = useStoredFlag('single-letter-keys-off');

  const add = useCallback((deeds: readonly KeyDeed[]) => {
    // How many sets of keys are heard stands on the page, for whoever must wait until it can be used.
    const tell = () => (document.documentElement.dataset.keys = String(sets.current.size));
    sets.current.add(deeds);
    tell();
    return () => {
      sets.current.delete(deeds);
      tell();
    };
  }, []);

  const list = useCallback(() => setListed([...sets.current].flat()), []);

  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (event.ctrlKey || event.metaKey || event.altKey || event.defaultPrevented) return;
      if (isTyping(event.target)) return;
      const isCharacter = event.key.length === 1;
      if (isCharacter && lettersOff) return;
      if (!isCharacter && hasOwnUse(event.target, event.key)) return;
      if (event.key === '?') {
        event.preventDefault();
        list();
        return;
      }
      const deed = [...sets.current].flat().find(({ keys }) => keys.includes(event.key));
      if (!deed) return;
      event.preventDefault();
      deed.run();
    };
    document.addEventListener('keydown', onKey);
    return () => document.removeEventListener('keydown', onKey);
  }, [lettersOff, list]);

  const book = useMemo(() => ({ add, list }), [add, list]);
  return (
    <Book value={book}>
      {children}
      <KeyList deeds={listed} onClose={() => setListed(null)} lettersOff={lettersOff} onLettersOff={setLettersOff} />
    </Book>
  );
}

/** Adds deeds to the page's keys while the component is mounted. Memoise `deeds`. */
export function useKeys(deeds: readonly KeyDeed[]) {
  const book = useContext(Book);
  useEffect(() => book?.add(deeds), [book, deeds]);
}

/** Opens the list of keys without a key. */
export function KeyListButton() {
  const book = useContext(Book);
  return (
    <button type="button" onClick={book?.list}>
      Keys of this page
    </button>
  );
}
