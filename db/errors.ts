/** What an error of the database means. Drizzle wraps the driver's errors; the chain of causes is followed. */

interface DriverError {
  code?: unknown;
  constraint?: unknown;
  message?: unknown;
}

function* causes(error: unknown): Generator<DriverError> {
  for (let depth = 0; depth < 8 && typeof error === 'object' && error !== null; depth++) {
    yield error;
    // Several addresses of one host failed: each has its own error.
    if (error instanceof AggregateError) yield* error.errors as DriverError[];
    error = 'cause' in error ? error.cause : null;
  }
}

/** Name of the constraint or rule that was broken; null where the error is another one. */
export function brokenRule(error: unknown): string | null {
  for (const { constraint } of causes(error)) if (typeof constraint === 'string') return constraint;
  return null;
}

// Class 08 connection exceptions; 57P01-57P03 shutdown and start-up; 53300 too many connections.
const AWAY_CODE = /^(08\d\d\d|57P0[123]|53300|ECONNREFUSED|ECONNRESET|EPIPE|ENOTFOUND|ETIMEDOUT|EHOSTUNREACH)$/;
const AWAY_MESSAGE =
  /^Connection terminated|^timeout exceeded when trying to connect|^Client has encountered a connection error|is not currently accepting connections$/;

/** Whether PostgreSQL is stopped, starting, unreachable or out of connections: a state that passes by itself. */
export function isDatabaseAway(error: unknown): boolean {
  for (const { code, message } of causes(error)) {
    if (typeof code === 'string' && AWAY_CODE.test(code)) return true;
    if (typeof message === 'string' && AWAY_MESSAGE.test(message)) return true;
  }
  return false;
}
