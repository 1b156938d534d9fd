export const THEMES = ['light', 'dark'] as const;
export type Theme = (typeof THEMES)[number];

export const THEME_COOKIE = 'theme';

/** The reader's own choice, or null where the system decides. */
export const parseTheme = (text: string | undefined): Theme | null => THEMES.find((theme) => theme === text) ?? null;
