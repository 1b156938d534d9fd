/** How often a new password may be asked for; counted in the database like tries to sign in, apart from them. */
export const RESET_LIMIT = { perEmail: 3, perAddress: 20, windowSeconds: 15 * 60 } as const;

/** Wrong present passwords on the profile page. */
export const PRESENT_PASSWORD_LIMIT = { perEmail: 5, perAddress: 40, windowSeconds: 15 * 60 } as const;

export function tooManyTries(waitSeconds: number): string {
  const minutes = Math.max(1, Math.ceil(waitSeconds / 60));
  return `Too many tries. Wait ${minutes === 1 ? 'a minute' : `${minutes} minutes`}, then try again.`;
}
