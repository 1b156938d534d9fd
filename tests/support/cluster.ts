import { Client } from 'pg';

/** The same server and user, another database. */
export const within = (url: string, database: string) => Object.assign(new URL(url), { pathname: `/${database}` }).href;

/** Runs one statement on a connection of its own. */
export async function runStatement(url: string, statement: string): Promise<void> {
  const client = new Client({ connectionString: url });
  await client.connect();
  try {
    await client.query(statement);
  } finally {
    await client.end();
  }
}
