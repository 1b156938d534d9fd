/** The package has no types of its own. */
declare module 'bibtex-parse' {
  /** Entries with their fields in capitals; key and type in small letters. @throws where the text is not BibTeX */
  export function entries(text: string): Record<string, unknown>[];
}
