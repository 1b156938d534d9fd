import 'server-only';
import { randomBytes } from 'node:crypto';

/**
 * Writes a fault to the log as one line of JSON; its text stays there.
 * @returns a short mark that the reader is shown and that finds the line again
 */
export function reportFault(where: string, error: unknown): string {
  const mark = randomBytes(3).toString('hex');
  const text = error instanceof Error ? (error.stack ?? error.message) : String(error);
  const cause = error instanceof Error && error.cause ? String(error.cause) : undefined;
  process.stderr.write(JSON.stringify({ at: new Date().toISOString(), fault: mark, where, text, cause }) + '\n');
  return mark;
}
