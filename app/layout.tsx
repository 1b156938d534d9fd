import type { Metadata, Viewport } from 'next';
import { cookies } from 'next/headers';
import { connection } from 'next/server';
import { HatchDefs } from '@/components/marks/hatch-defs';
import { THEME_COOKIE, parseTheme } from '@/components/ui/theme';
import { fontVariables } from './fonts';
import './globals.css';

export const metadata: Metadata = {
  title: { default: 'Levelbook', template: '%s · Levelbook' },
  description: 'Vetted stencils and time-marching schemes: orders, bounds, storage, kernels and trials.',
};

export const viewport: Viewport = {
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#fafcfb' },
    { media: '(prefers-color-scheme: dark)', color: '#13242a' },
  ],
};

export default async function RootLayout({ children }: { children: React.ReactNode }) {
  // Every page is rendered for its request: a page made at build time would carry no nonce and its scripts would be blocked.
  await connection();
  const theme = parseTheme((await cookies()).get(THEME_COOKIE)?.value);

  return (
    <html lang="en" className={fontVariables} data-theme={theme ?? undefined} suppressHydrationWarning>
      <body>
        <HatchDefs />
        {children}
      </body>
    </html>
  );
}
