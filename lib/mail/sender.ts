import type { Settings } from '@/lib/env';
import type { Sender } from './letter-content';

/** Who writes, by the settings. */
export function senderOf({
  NEXTAUTH_URL,
  LEVELBOOK_OFFICE,
}: Pick<Settings, 'NEXTAUTH_URL' | 'LEVELBOOK_OFFICE'>): Sender {
  return { origin: NEXTAUTH_URL.replace(/\/+$/, ''), office: LEVELBOOK_OFFICE ?? null };
}

/** The From of letters: MAIL_FROM, or one at the site's own address. */
export const fromOf = ({ MAIL_FROM, NEXTAUTH_URL }: Pick<Settings, 'MAIL_FROM' | 'NEXTAUTH_URL'>): string =>
  MAIL_FROM ?? `Levelbook <levelbook@${new URL(NEXTAUTH_URL).hostname}>`;
