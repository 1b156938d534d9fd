/** Gives each database test file a database of its own, before the file and anything it imports is loaded. */
import { randomBytes } from 'node:crypto';
import { afterAll, inject } from 'vitest';
import { runStatement, within } from './cluster';

const clusterUrl = inject('testClusterUrl');
const name = `test_${process.pid}_${randomBytes(5).toString('hex')}`;

await runStatement(clusterUrl, `create database ${name} template ${inject('templateName')} strategy file_copy`);
process.env.DATABASE_URL = within(clusterUrl, name);

afterAll(() => runStatement(clusterUrl, `drop database if exists ${name} with (force)`));
