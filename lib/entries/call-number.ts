import type { Equation } from '@/lib/numerics/equation';
import type { Definition } from './definition';
import type { CALL_LETTERS, EntryKind } from './entry';

type CallLetters = (typeof CALL_LETTERS)[number];

const LETTERS_OF_EQUATION: Readonly<Record<Equation, CallLetters>> = {
  advection: 'AD',
  'advection-2d': 'AD',
  diffusion: 'DI',
  'diffusion-2d': 'DI',
  'diffusion-3d': 'DI',
  'advection-diffusion': 'AX',
  wave: 'WA',
  'wave-2d': 'WA',
  'wave-3d': 'WA',
  schrodinger: 'SC',
  airy: 'AI',
  hyperdiffusion: 'HY',
};

/** The two letters under which a definition is booked. */
export function callLettersOf(definition: Definition): CallLetters {
  if (definition.kind === 'stencil') return 'ST';
  if (definition.kind === 'time-method') return 'TM';
  return definition.form === 'system' ? 'VP' : LETTERS_OF_EQUATION[definition.equation];
}

export const equationOf = (definition: Definition): Equation | null =>
  definition.kind === 'scheme' ? definition.equation : null;

export const kindOf = (definition: Definition): EntryKind => definition.kind;

/** "AD 003" */
export const formatCallNumber = (letters: string, number: number) => `${letters} ${String(number).padStart(3, '0')}`;

/** An address from a title: "Lax–Wendroff, 2nd form" gives "lax-wendroff-2nd-form". Never empty. */
export function slugOfTitle(title: string): string {
  const slug = title
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .slice(0, 70)
    .replace(/^-+|-+$/g, '');
  return slug || 'entry';
}
