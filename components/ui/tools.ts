import { type Role, includesRole } from '@/lib/people/role';

interface Tool {
  readonly name: string;
  readonly href: string;
  /** Other addresses that belong to it. */
  readonly within: readonly string[];
  /** The first role that it is for; everyone where it is left out. */
  readonly minRole?: Role;
}

/** The places of the book, in the order of the head; one line adds one. */
export const TOOLS: readonly Tool[] = [
  { name: 'Catalog', href: '/', within: ['/sheets'] },
  { name: 'Shortlist', href: '/shortlist', within: [] },
  { name: 'Run budget', href: '/budget', within: ['/budget'] },
  { name: 'Side by side', href: '/compare', within: [] },
  { name: 'Drafting table', href: '/drafts', within: ['/drafts'] },
  { name: 'Review desk', href: '/reviews', within: ['/reviews'], minRole: 'maintainer' },
  { name: 'People', href: '/people', within: [], minRole: 'administrator' },
  { name: 'Ledger', href: '/ledger', within: [], minRole: 'administrator' },
  { name: 'Outbox', href: '/outbox', within: ['/arrived-mail'], minRole: 'administrator' },
];

export const toolsFor = (role: Role) => TOOLS.filter(({ minRole }) => !minRole || includesRole(role, minRole));

/** The tool whose page is open. */
export const currentTool = (path: string) =>
  TOOLS.find(
    ({ href, within }) => path === href || within.some((start) => path === start || path.startsWith(`${start}/`)),
  );
