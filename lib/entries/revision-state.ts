/** The states of a revision, in the order in which the book shows them. */
export const REVISION_STATES = ['draft', 'in-review', 'returned', 'vetted', 'superseded', 'withdrawn'] as const;
export type RevisionState = (typeof REVISION_STATES)[number];

/** What a reader may see; the rest is for those who work on the entry. */
export const PUBLISHED_STATES = ['vetted', 'superseded', 'withdrawn'] as const satisfies readonly RevisionState[];
