/** Roles, each including the ones before it. */
export const ROLES = ['reader', 'contributor', 'maintainer', 'administrator'] as const;
export type Role = (typeof ROLES)[number];

export const includesRole = (role: Role, needed: Role) => ROLES.indexOf(role) >= ROLES.indexOf(needed);
