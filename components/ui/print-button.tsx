'use client';

import { useHydrated } from './use-hydrated';

/** Opens the browser's own print window. */
export const PrintButton = ({ className = 'btn lite' }: { className?: string }) => (
  <button type="button" className={className} disabled={!useHydrated()} onClick={() => window.print()}>
    Print
  </button>
);
