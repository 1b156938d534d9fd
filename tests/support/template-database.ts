/**
 * Makes one migrated database before the database tests; each test file then copies it, which is far
 * quicker than migrating again.
 */
import { readFileSync } from 'node:fs';
import path from 'node:path';
import type { TestProject } from 'vitest/node';
import { applyMigrations } from '@/db/apply-migrations';
import { runStatement, within } from './cluster';

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
    return readFileSync(path.resolve(import.meta.dirname, '../../.data/test-database-url'), 'utf8').trim();
  } catch {
    throw new Error('No test database: set TEST_DATABASE_URL, or run "node lib/launch/dev-database.mjs" beside this.');
  }
}

export default async function makeTemplate(project: TestProject) {
  const url = testClusterUrl();
  const templateName = `template_${process.pid}_${Date.now().toString(36)}`;
  await runStatement(url, `create database ${templateName}`);
  await applyMigrations(within(url, templateName));
  // A template that somebody is connected to cannot be copied.
  await runStatement(url, `alter database ${templateName} allow_connections false`);
  project.provide('testClusterUrl', url);
  project.provide('templateName', templateName);
  return () => runStatement(url, `drop database if exists ${templateName} with (force)`);
}
