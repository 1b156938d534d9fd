/**
 * `npm test`: the set-up of `npm start` plus a browser, then every check of the project; all of them run even if
 * one fails. `npm test -- unit database` runs only the named ones. The last line is "N passed, N failed".
 */
import fs from 'node:fs';
import path from 'node:path';
import { ensureBuild, isBuilt } from './build.mjs';
import { endAllChildren, run } from './children.mjs';
import { holderOf, releaseLock, takeLock } from './lock.mjs';
import { ensureNodePackages } from './node-packages.mjs';
import { DATA } from './places.mjs';
import { freePort } from './ports.mjs';
import { startCluster } from './postgres.mjs';
import { say, seconds } from './say.mjs';
import { settingsFor } from './settings.mjs';
import { catcherSettings, fillDemo, migrateDatabase, startMailCatcher, startWeb, startWorker } from './site.mjs';
import { ensureSystemPackages } from './system-packages.mjs';
import { countPlaywright, countVitest } from './test-reports.mjs';

const LOCK = 'test';
const REPORTS = path.join(DATA, 'reports');

/** What must be stopped in the end, the latest first. */
const running = [];
let finishing = false;

async function keepForNow(part) {
  running.unshift(part);
  return part;
}

/** Stops what the tests started, and reports the count; without any test that passed or failed it is a failure. */
async function finish({ passed, failed }) {
  if (finishing) return;
  finishing = true;
  for (const part of running) await part.stop();
  await endAllChildren();
  releaseLock(LOCK);
  say(`\n${passed} passed, ${failed} failed`);
  process.exit(passed > 0 && failed === 0 ? 0 : 1);
}

const node = (args, env = process.env) => run(process.execPath, args, { env });
const asCheck = (status) => ({ passed: status === 0 ? 1 : 0, failed: status === 0 ? 0 : 1 });

function freshReport(name) {
  fs.mkdirSync(REPORTS, { recursive: true });
  const file = path.join(REPORTS, `${name}.json`);
  fs.rmSync(file, { force: true });
  return file;
}

let cluster = null;
/** The tests' own cluster: nothing of a developer's is touched, and nothing waits for the disk. */
async function testCluster() {
  cluster ??= await keepForNow(await startCluster({ name: 'ci', wishPort: 54340, durable: false }));
  return cluster;
}

async function vitest(project, env = process.env) {
  const report = freshReport(project);
  const reporters = ['--reporter=default', '--reporter=json', `--outputFile.json=${report}`];
  const status = await node(['node_modules/vitest/vitest.mjs', 'run', '--project', project, ...reporters], env);
  return countVitest(report, status);
}

/** A site of its own, with the demo on an empty database, for as long as the browser tests take. */
async function browser() {
  if (!isBuilt()) throw new Error('There is no production build to test.');
  const { url, emptyDatabase } = await testCluster();
  emptyDatabase('browser');
  const host = '127.0.0.1';
  const port = await freePort(3100, host);
  const address = `http://${host}:${port}`;
  const settings = settingsFor({ databaseUrl: url('browser'), port, demo: true, production: true });
  const env = { ...settings, NEXTAUTH_URL: address, ...(await catcherSettings()) };
  await migrateDatabase(env);
  await fillDemo(env);
  const web = await keepForNow(await startWeb({ env, host, port, production: true }));
  const catcher = await keepForNow(startMailCatcher({ env }));
  const worker = await keepForNow(await startWorker({ env }));
  const report = freshReport('browser');
  const status = await node(['node_modules/@playwright/test/cli.js', 'test', '--reporter=list,json'], {
    ...process.env,
    LEVELBOOK_URL: address,
    DATABASE_URL: url('browser'),
    PLAYWRIGHT_JSON_OUTPUT_NAME: report,
  });
  await worker.stop();
  await catcher.stop();
  await web.stop();
  return countPlaywright(report, status);
}

const STEPS = {
  lint: async () => asCheck(await node(['node_modules/eslint/bin/eslint.js', '.', '--max-warnings=0'])),
  format: async () =>
    asCheck(await node(['node_modules/prettier/bin/prettier.cjs', '--check', '--log-level=warn', '.'])),
  types: async () => {
    // Page and route types are generated; without them a fresh clone does not know its own addresses.
    const generated = await node(['node_modules/next/dist/bin/next', 'typegen']);
    return asCheck(generated || (await node(['node_modules/typescript/bin/tsc', '--noEmit'])));
  },
  unit: () => vitest('unit'),
  database: async () =>
    vitest('database', { ...process.env, TEST_DATABASE_URL: (await testCluster()).url('postgres') }),
  kernels: () => vitest('kernels'),
  build: async () => {
    if (holderOf('start') && !isBuilt()) throw new Error('"npm start" runs here from an older build; stop it first.');
    await ensureBuild();
    return { passed: 1, failed: 0 };
  },
  browser,
};

function chosenSteps() {
  const names = process.argv.slice(2);
  const unknown = names.filter((name) => !(name in STEPS));
  if (unknown.length > 0) {
    throw new Error(`Unknown step: ${unknown.join(', ')}. Accepted: ${Object.keys(STEPS).join(', ')}.`);
  }
  return names.length > 0 ? Object.keys(STEPS).filter((name) => names.includes(name)) : Object.keys(STEPS);
}

async function main() {
  const steps = chosenSteps();
  const holder = takeLock(LOCK);
  if (holder) throw new Error(`The tests already run in this folder (process ${holder.pid}).`);
  // A developer's own settings must not decide whether tests pass.
  for (const name of Object.keys(process.env)) {
    if (/^(LEVELBOOK_|NEXTAUTH_|SMTP_|MAIL_)|^(DATABASE_URL|TEST_DATABASE_URL|PORT|NODE_ENV)$/.test(name)) {
      delete process.env[name];
    }
  }
  await ensureSystemPackages({ withTests: true, withServer: true });
  await ensureNodePackages();

  const total = { passed: 0, failed: 0 };
  const lines = [];
  for (const name of steps) {
    say(`\n--- ${name}`);
    const since = Date.now();
    let result;
    try {
      result = await STEPS[name]();
    } catch (error) {
      say(`${name}: ${error.message}`);
      result = { passed: 0, failed: 1 };
    }
    total.passed += result.passed;
    total.failed += result.failed;
    lines.push(`  ${name}: ${result.passed} passed, ${result.failed} failed, ${seconds(Date.now() - since)}`);
  }
  say(`\nSteps:\n${lines.join('\n')}`);
  return total;
}

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
  process.once(signal, () => {
    say(`\nStopped by ${signal}.`);
    void finish({ passed: 0, failed: 1 });
  });
}

main().then(finish, (error) => {
  say(error.message);
  return finish({ passed: 0, failed: 1 });
});
