/** How often sign-in may be tried. Failures are counted in the database, so that the limit holds across instances. */
export const SIGN_IN_LIMIT = {
  /** Failures of one e-mail address since its last success. */
  perEmail: 5,
  /** Failures from one network address, whoever they claim to be: an office shares one. */
  perAddress: 40,
  /** Failures older than this are forgotten. */
  windowSeconds: 15 * 60,
} as const;
