/**
 * The database does not answer. The digest reaches the error page in production too, where messages are
 * hidden: `error.digest === 'database-away'` is what it asks to say so and to try again.
 */
export class DatabaseAway extends Error {
  readonly digest = 'database-away';
  constructor(cause: unknown) {
    super('The database does not answer.', { cause });
    this.name = 'DatabaseAway';
  }
}
