import type { DemoEntry } from '../demo-entry';

export const ADVECTION_FIRST: DemoEntry[] = [
  {
    letters: 'AD',
    number: 2,
    slug: 'lax-wendroff',
    title: 'Lax–Wendroff',
    gist: 'Damps the short waves; the usual starter for three-level schemes.',
    synonyms: ['LW', 'Lax Wendroff', 'Leith', 'second-order one-step advection', 'Taylor-Galerkin without mass matrix'],
    definition: {
      kind: 'scheme',
      equation: 'advection',
      form: 'table',
      terms: [
        { level: 1, offset: 0, coefficient: '1' },
        { level: 0, offset: -1, coefficient: '-lambda/2 - lambda^2/2' },
        { level: 0, offset: 0, coefficient: '-1 + lambda^2' },
        { level: 0, offset: 1, coefficient: 'lambda/2 - lambda^2/2' },
      ],
    },
    references: [
      {
        authors: 'P. D. Lax, B. Wendroff',
        title: 'Systems of conservation laws',
        source: 'Communications on Pure and Applied Mathematics 13, 217–237',
        year: 1960,
        doi: '10.1002/cpa.3160130205',
        note: null,
      },
    ],
    notes:
      'Taylor expansion of $u(t+\\Delta t)$ to second order with both time derivatives replaced by space derivatives, and those by central differences.',
    author: 'ruth.halloran@example.org',
    plan: { become: 'vetted', signedBy: ['tomas.aalto@example.org', 'ilse.quist@example.org'] },
    adoptions: [{ code: 'Saltings', by: 'jonas.feld@example.org' }],
  },
  {
    letters: 'AD',
    number: 3,
    slug: 'leapfrog-central-2',
    title: 'Leapfrog in time, centred in space',
    gist: 'Keeps every wave at its full height for as long as you run it. Short waves fall behind, and odd and even steps can drift apart: filter now and then, or restart.',
    synonyms: [
      'leap frog',
      'leap-frog',
      'midpoint in time',
      'CTCS',
      'centred time centred space',
      'central time central space',
    ],
    definition: {
      kind: 'scheme',
      equation: 'advection',
      form: 'table',
      terms: [
        { level: 1, offset: 0, coefficient: '1' },
        { level: 0, offset: -1, coefficient: '-lambda' },
        { level: 0, offset: 1, coefficient: 'lambda' },
        { level: -1, offset: 0, coefficient: '-1' },
      ],
    },
    references: [
      {
        authors: 'R. Courant, K. Friedrichs, H. Lewy',
        title: 'Über die partiellen Differenzengleichungen der mathematischen Physik',
        source: 'Mathematische Annalen 100, 32–74',
        year: 1928,
        doi: '10.1007/BF01448839',
        note: null,
      },
      {
        authors: 'R. D. Richtmyer, K. W. Morton',
        title: 'Difference Methods for Initial-Value Problems, 2nd edition',
        source: 'Interscience',
        year: 1967,
        doi: null,
        note: null,
      },
    ],
    notes:
      'Needs one starting step; AD 002 keeps the order. Where the two modes part, restart from AD 002 every few hundred steps or filter.',
    author: 'sanna.varga@example.org',
    plan: { become: 'vetted', signedBy: ['ruth.halloran@example.org', 'ilse.quist@example.org'] },
    adoptions: [
      { code: 'Saltings', by: 'jonas.feld@example.org' },
      { code: 'Skerry', by: 'sanna.varga@example.org' },
    ],
    remarks: [
      {
        by: 'sanna.varga@example.org',
        part: 'notes',
        text: 'Skerry restarts from AD 002 every 400 steps rather than filter; the tide keeps its range.',
      },
      {
        by: 'ilse.quist@example.org',
        part: 'notes',
        text: 'Good reading. The restart is in the note now, so that the next reader finds it.',
      },
    ],
  },
  {
    letters: 'AD',
    number: 8,
    slug: 'forward-euler-central',
    title: 'Forward Euler in time, centred in space',
    gist: 'Grows for every step size. Kept so that nobody books it twice.',
    synonyms: ['FTCS advection', 'forward time central space', 'explicit Euler central', 'Euler central'],
    definition: {
      kind: 'scheme',
      equation: 'advection',
      form: 'table',
      terms: [
        { level: 1, offset: 0, coefficient: '1' },
        { level: 0, offset: -1, coefficient: '-lambda/2' },
        { level: 0, offset: 0, coefficient: '-1' },
        { level: 0, offset: 1, coefficient: 'lambda/2' },
      ],
    },
    references: [
      {
        authors: 'R. D. Richtmyer, K. W. Morton',
        title: 'Difference Methods for Initial-Value Problems, 2nd edition',
        source: 'Interscience',
        year: 1967,
        doi: null,
        note: 'Chapter on the transport equation.',
      },
    ],
    notes:
      'The amplification factor is $1 - i\\lambda\\sin\\theta$, larger than one in modulus for every wave but the longest and the shortest.',
    author: 'pavel.marsh@example.org',
    plan: {
      become: 'withdrawn',
      by: 'tomas.aalto@example.org',
      reason: 'Unstable for every lambda. Kept so that nobody books it twice.',
      useInstead: 'lax-wendroff',
    },
  },
];
