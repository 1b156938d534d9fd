/** The places of the book, in the order of the head; one line adds one. `within` are the addresses that belong to it. */
export const TOOLS: readonly { readonly name: string; readonly href: string; readonly within: readonly string[] }[] = [
  { name: 'Catalog', href: '/', within: ['/sheets'] },
];

/** The tool whose page is open. */
export const currentTool = (path: string) =>
  TOOLS.find(({ href, within }) => path === href || within.some((start) => path.startsWith(`${start}/`)));
