export const REFUSAL_CODES = [
  'not-signed-in',
  'not-allowed',
  'not-found',
  'conflict',
  'invalid',
  'too-many',
  'unavailable',
] as const;
export type RefusalCode = (typeof REFUSAL_CODES)[number];

/** The expected "no": a code for programs and a sentence for the reader. Thrown by use cases, answered by the frames in lib/web. */
export class Refusal extends Error {
  constructor(
    readonly code: RefusalCode,
    message: string,
    /** Field to message, where a form is at fault. */
    readonly fields: Readonly<Record<string, string>> = {},
  ) {
    super(message);
    this.name = 'Refusal';
  }
}
