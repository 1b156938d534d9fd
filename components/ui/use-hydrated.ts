import { useSyncExternalStore } from 'react';

const never = () => () => undefined;

/** False in the server's HTML, true once the page listens: for buttons that do nothing before. */
export const useHydrated = () =>
  useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
