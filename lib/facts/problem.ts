/** Makers of problems: what is wrong in a definition, where, and what is accepted. */
import type { Problem } from './facts';

export const problemAt = (pointer: string, code: string, message: string, column?: number): Problem => ({
  pointer,
  ...(column === undefined ? {} : { column }),
  severity: 'error',
  code,
  message,
});
export const warningAt = (pointer: string, code: string, message: string): Problem => ({
  pointer,
  severity: 'warning',
  code,
  message,
});
export const hasErrors = (problems: readonly Problem[]) => problems.some((p) => p.severity === 'error');
