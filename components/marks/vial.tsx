import type { RevisionState } from '@/lib/entries/revision-state';

const WHOLE_TUBE = <rect x="1" y="3" width="44" height="10" rx="5" className="v-tube" />;
const TICKS = <path d="M17 .5V15.5M29 .5V15.5" className="v-tick" />;

const DRAWN = {
  draft: (
    <>
      <rect x="1" y="3" width="44" height="10" rx="5" className="v-tube v-dash" />
      {TICKS}
    </>
  ),
  'in-review': (
    <>
      {WHOLE_TUBE}
      <rect x="5" y="5" width="10" height="6" rx="3" className="v-open" />
      {TICKS}
    </>
  ),
  returned: (
    <>
      {WHOLE_TUBE}
      <path d="M4 8l7-4v8z" className="v-ret" />
      <path d="M11 8H15" className="v-retl" />
      {TICKS}
    </>
  ),
  vetted: (
    <>
      {WHOLE_TUBE}
      <rect x="18.4" y="4.6" width="9.2" height="6.8" rx="3.4" className="v-bub" />
      {TICKS}
    </>
  ),
  superseded: (
    <>
      {WHOLE_TUBE}
      <rect x="18.4" y="4.6" width="9.2" height="6.8" rx="3.4" className="v-open" />
      <path d="M0 8H46" className="v-strike" />
      {TICKS}
    </>
  ),
  withdrawn: (
    <>
      <path d="M20 3H6a5 5 0 000 10H16" className="v-tube" />
      <path d="M26 13H40a5 5 0 000-10H30" className="v-tube" />
      <path d="M15.5 14.8L22 1.2M23.5 14.8L30 1.2" className="v-crack" />
    </>
  ),
} as const satisfies Record<RevisionState, React.ReactNode>;

export const STATE_WORDS = {
  draft: 'Draft',
  'in-review': 'In review',
  returned: 'Returned',
  vetted: 'Vetted',
  superseded: 'Superseded',
  withdrawn: 'Withdrawn',
} as const satisfies Record<RevisionState, string>;

/** The mark of a state; decoration only, so its word always stands beside it. */
export function Vial({ state, small = false }: { state: RevisionState; small?: boolean }) {
  const [width, height] = small ? [40, 14] : [46, 16];
  return (
    <svg className={`vial v-${state}`} width={width} height={height} viewBox="0 0 46 16" aria-hidden="true">
      {DRAWN[state]}
    </svg>
  );
}

/** The mark and its word. */
export function StateMark({ state, small = false }: { state: RevisionState; small?: boolean }) {
  return (
    <span className="state">
      <Vial state={state} small={small} />
      <span className={small ? 'tiny' : undefined}>{STATE_WORDS[state]}</span>
    </span>
  );
}
