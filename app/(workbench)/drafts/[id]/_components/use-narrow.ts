import { useSyncExternalStore } from 'react';

const QUERY = '(max-width: 700px)';

const listen = (tell: () => void) => {
  const media = window.matchMedia(QUERY);
  media.addEventListener('change', tell);
  return () => media.removeEventListener('change', tell);
};

/** Whether the page has the width of a phone, so that a drawing is made for it. */
export const useNarrow = () =>
  useSyncExternalStore(
    listen,
    () => window.matchMedia(QUERY).matches,
    () => false,
  );
