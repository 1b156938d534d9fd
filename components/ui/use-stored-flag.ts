import { useCallback, useSyncExternalStore } from 'react';

const CHANGED = 'levelbook:flag';

/** A yes or no that this browser remembers; "no" on the server and until it is read. */
export function useStoredFlag(name: string): [boolean, (on: boolean) => void] {
  const subscribe = useCallback((changed: () => void) => {
    window.addEventListener('storage', changed);
    window.addEventListener(CHANGED, changed);
    return () => {
      window.removeEventListener('storage', changed);
      window.removeEventListener(CHANGED, changed);
    };
  }, []);
  const on = useSyncExternalStore(
    subscribe,
    () => localStorage.getItem(name) === 'on',
    () => false,
  );
  const set = useCallback(
    (next: boolean) => {
      localStorage.setItem(name, next ? 'on' : 'off');
      window.dispatchEvent(new Event(CHANGED));
    },
    [name],
  );
  return [on, set];
}
