'use client';

import { THEME_COOKIE, parseTheme } from './theme';

const A_YEAR_S = 365 * 24 * 3600;

function turnPage() {
  const root = document.documentElement;
  const system = window.matchMedia('(prefers-color-scheme: dark)').matches ? 'dark' : 'light';
  const next = (parseTheme(root.dataset.theme) ?? system) === 'dark' ? 'light' : 'dark';
  root.dataset.theme = next;
  document.cookie = `${THEME_COOKIE}=${next}; path=/; max-age=${A_YEAR_S}; samesite=lax`;
}

/** Turns the day page to the night page and back; the choice is kept in a cookie, so that the server draws it at once. */
export const ThemeButton = ({ className }: { className?: string }) => (
  <button type="button" className={className} onClick={turnPage}>
    Day / night
  </button>
);
