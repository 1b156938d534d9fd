/**
 * Makes one migrated database before the database tests; each test file then copies it, which is far
 * quicker than migrating again.
 */
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { drizzle } from 'drizzle-orm/node-postgres';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import { Client } from 'pg';
import type { TestProject } from 'vitest/node';

const ROOT = path.resolve(import.meta.dirname, '..', '..');

declare module 'vitest' {
  export interface ProvidedContext {
    /** Address of the test cluster, with rights to make databases. */
    testClusterUrl: string;
    templateName: string;
  }
}

function testClusterUrl(): string {
  const given = process.env.TEST_DATABASE_URL;
  if (given) return given;
  try {
    return readFileSync(path.join(ROOT, '.data/test-database-url'), 'utf8').trim();
  } catch {
    throw new Error('No test database: set TEST_DATABASE_URL, or run "node lib/launch/dev-database.mjs" beside this.');
  }
}

const within = (url: string, database: string) => Object.assign(new URL(url), { pathname: `/${database}` }).href;

async function run(url: string, work: (client: Client) => Promise<unknown>): Promise<void> {
  const client = new Client({ connectionString: url });
  await client.connect();
  try {
    await work(client);
  } finally {
    await client.end();
  }
}

export default async function makeTemplate(project: TestProject) {
  const url = testClusterUrl();
  const templateName = `template_${process.pid}_${Date.now().toString(36)}`;
  await run(url, (client) => client.query(`create database ${templateName}`));
  await run(within(url, templateName), (client) =>
    migrate(drizzle(client), { migrationsFolder: path.join(ROOT, 'drizzle') }),
  );
  // A template that somebody is connected to cannot be copied.
  await run(url, (client) => client.query(`alter database ${templateName} allow_connections false`));
  project.provide('testClusterUrl', url);
  project.provide('templateName', templateName);
  return () => run(url, (client) => client.query(`drop database if exists ${templateName} with (force)`));
}
