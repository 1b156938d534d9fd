/** Links that letters carry, each for one purpose and one use. */
export const LINK_PURPOSES = ['invitation', 'password-reset'] as const;
export type LinkPurpose = (typeof LINK_PURPOSES)[number];

/** How long a link serves, counted from when its letter goes out. */
export const LINK_HOURS: Readonly<Record<LinkPurpose, number>> = { invitation: 7 * 24, 'password-reset': 2 };

/** What a secret looks like: 32 bytes as base64url. */
export const LINK_SECRET = /^[A-Za-z0-9_-]{43}$/;
