/** Gives each database test file a database of its own, before the file and anything it imports is loaded. */
import { randomBytes } from 'node:crypto';
import { Client } from 'pg';
import { afterAll, inject } from 'vitest';

const clusterUrl = inject('testClusterUrl');
const name = `test_${process.pid}_${randomBytes(5).toString('hex')}`;

async function command(statement: string): Promise<void> {
  const client = new Client({ connectionString: clusterUrl });
  await client.connect();
  try {
    await client.query(statement);
  } finally {
    await client.end();
  }
}

await command(`create database ${name} template ${inject('templateName')} strategy file_copy`);
process.env.DATABASE_URL = Object.assign(new URL(clusterUrl), { pathname: `/${name}` }).href;

afterAll(() => command(`drop database if exists ${name} with (force)`));
