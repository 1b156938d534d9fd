/** The invented people of Brackwater Modelling Office. Their accounts work in demo mode only. */
import type { Role } from './role';

export interface DemoPerson {
  email: string;
  name: string;
  role: Role;
  /** What they come for, for the sign-in page. */
  comesFor: string;
}

/** One password for the whole demo office; it protects nothing and is shown on the sign-in page. */
export const DEMO_PASSWORD = 'low water at six';

export const DEMO_PEOPLE = [
  { email: 'ruth.halloran@example.org', name: 'Ruth Halloran', role: 'administrator', comesFor: 'keeps the house' },
  { email: 'tomas.aalto@example.org', name: 'Tomas Aalto', role: 'maintainer', comesFor: 'keeps the book right' },
  { email: 'ilse.quist@example.org', name: 'Ilse Quist', role: 'maintainer', comesFor: 'reviews what comes in' },
  { email: 'sanna.varga@example.org', name: 'Sanna Varga', role: 'contributor', comesFor: 'adds schemes for Skerry' },
  {
    email: 'pavel.marsh@example.org',
    name: 'Pavel Marsh',
    role: 'contributor',
    comesFor: 'adds schemes for Fathomline',
  },
  {
    email: 'noor.adeyemi@example.org',
    name: 'Noor Adeyemi',
    role: 'contributor',
    comesFor: 'adds schemes for Rimefront',
  },
  { email: 'jonas.feld@example.org', name: 'Jonas Feld', role: 'reader', comesFor: 'takes kernels for Saltings' },
  { email: 'mirre.okafor@example.org', name: 'Mirre Okafor', role: 'reader', comesFor: 'started this month' },
] as const satisfies readonly DemoPerson[];

export type DemoEmail = (typeof DEMO_PEOPLE)[number]['email'];

/** The office's codes, and what they are for. */
export const DEMO_CODES = {
  Saltings: 'tides, inner estuary',
  Skerry: 'tides, open shelf',
  Fathomline: 'underwater sound',
  Rimefront: 'frozen ground',
} as const;
export type DemoCode = keyof typeof DEMO_CODES;
