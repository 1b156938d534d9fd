/**
 * `npm start`: everything from nothing to a running site. `npm run dev`: the same with the development server.
 * `npm start -- --web` and `npm start -- --worker` start only that part, for a site on several machines.
 * Node's own modules only: this runs before anything is installed.
 */
import path from 'node:path';
import { ensureBuild } from './build.mjs';
import { endAllChildren, letNoneStart } from './children.mjs';
import { keepRunning } from './keep-running.mjs';
import { releaseLock, takeLock, tellOthers } from './lock.mjs';
import { ensureNodePackages } from './node-packages.mjs';
import { startCluster } from './postgres.mjs';
import { DATA, writePrivately } from './places.mjs';
import { livingProcess } from './processes.mjs';
import { say, seconds, step } from './say.mjs';
import { chooseAddress, givenDatabase, readEnvFile, settingsFor } from './settings.mjs';
import {
  catcherSettings,
  databaseListens,
  fillDemo,
  migrateDatabase,
  startMailCatcher,
  startWeb,
  startWorker,
} from './site.mjs';
import { ensureSystemPackages } from './system-packages.mjs';

const LOCK = 'start';
const FLAGS = ['--dev', '--web', '--worker'];
const flags = process.argv.slice(2);
const production = !flags.includes('--dev');
const withWeb = flags.includes('--web') || !flags.includes('--worker');
const withWorker = flags.includes('--worker') || !flags.includes('--web');
const since = Date.now();

/** What runs, in the order of starting; stopped from the end. */
const kept = [];
let stopping = null;

function stop(status) {
  stopping ??= (async () => {
    letNoneStart();
    for (const one of kept.reverse()) await one.stop();
    await endAllChildren();
    releaseLock(LOCK);
    process.exit(status);
  })();
  return stopping;
}

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
  process.on(signal, () => {
    if (!stopping) say(`\nStopping (${signal}).`);
    void stop(0);
  });
}

/** npm may be killed without a word to us; nobody could then stop the site from its terminal. */
function stopWithNpm() {
  if (!process.env.npm_lifecycle_event) return;
  const parent = process.ppid;
  // npm starts us through a shell, which stays between us or gives its place to us.
  const throughShell = ['sh', 'dash', 'bash'].includes(livingProcess(parent)?.name);
  const npm = throughShell ? livingProcess(parent).parent : parent;
  const isThere = () => process.ppid === parent && (!throughShell || livingProcess(parent)?.parent === npm);
  setInterval(() => {
    if (stopping || isThere()) return;
    say('\nStopping (npm has ended).');
    void stop(0);
  }, 1_000).unref();
}

async function keep(name, start) {
  const one = await keepRunning({ name, start });
  if (stopping) return one.stop();
  kept.push(one);
  void one.gaveUp.then((sentence) => {
    say(sentence);
    return stop(1);
  });
}

/** Our own server, unless DATABASE_URL names another. */
async function databaseUrl() {
  const given = givenDatabase();
  if (given) {
    if (await databaseListens(given)) return given;
    throw new Error(`no PostgreSQL answers at ${new URL(given).host}, which DATABASE_URL names.`);
  }
  let cluster = null;
  await step('database server', () =>
    keep('database server', async () => {
      // Web and worker know the address, so that a second start must have the same.
      cluster = await startCluster({
        name: 'pg',
        wishPort: cluster?.port ?? 54329,
        samePort: cluster !== null,
      });
      cluster.ensureDatabase('levelbook');
      writePrivately(path.join(DATA, 'database-url'), `${cluster.url('levelbook')}\n`);
      return cluster;
    }),
  );
  return cluster.url('levelbook');
}

function refuseToStart(sentence) {
  say(sentence);
  process.exit(1);
}

async function main() {
  const unknown = flags.filter((flag) => !FLAGS.includes(flag));
  if (unknown.length > 0) refuseToStart(`Unknown: ${unknown.join(' ')}. Accepted: ${FLAGS.join(', ')}.`);
  // Workers may stand side by side; two web servers would build in one folder.
  const holder = withWeb ? takeLock(LOCK) : null;
  if (holder) {
    const where = holder.address ? `at ${holder.address}` : 'and is still getting ready';
    refuseToStart(
      `Levelbook already runs in this folder ${where}. To stop it: Ctrl-C in its window, or kill ${holder.pid}`,
    );
  }
  stopWithNpm();
  say(production ? 'Levelbook is getting ready.' : 'Levelbook is getting ready for development.');
  readEnvFile();
  const ownServer = !process.env.DATABASE_URL;
  await ensureSystemPackages({ withTests: false, withServer: ownServer });
  await ensureNodePackages();
  const { host, port } = withWeb ? await chooseAddress() : { port: process.env.PORT ?? 3000 };
  const env = settingsFor({ databaseUrl: await databaseUrl(), port, demo: ownServer, production });
  const catchesMail = withWeb && withWorker && !env.SMTP_URL && (env.LEVELBOOK_DEMO === '1' || !production);
  if (catchesMail) Object.assign(env, await catcherSettings());
  await step('schema of the database', () => migrateDatabase(env));
  const serve = async () => {
    if (production) await ensureBuild();
    await step('web server', () => keep('web server', () => startWeb({ env, host, port, production })));
  };
  // Side by side: the one computes facts, the other bundles pages.
  await Promise.all([
    withWeb && serve(),
    env.LEVELBOOK_DEMO === '1' && step('content of the demo', () => fillDemo(env)),
  ]);
  if (catchesMail) await step('mail catcher', () => keep('mail catcher', async () => startMailCatcher({ env })));
  if (withWorker) await step('worker', () => keep('worker', () => startWorker({ env })));

  const address = process.env.NEXTAUTH_URL ?? `http://localhost:${port}`;
  if (withWeb) tellOthers(LOCK, { address });
  say(`\nLevelbook is ready after ${seconds(Date.now() - since)}${withWeb ? `: ${address}` : ' (a worker only).'}`);
  if (withWeb && env.LEVELBOOK_DEMO === '1') say('The accounts of the demo are shown on the sign-in page.');
  if (catchesMail) say('No mail leaves this machine: administrators find the letters under "Arrived mail".');
  say('Ctrl-C stops it.');
}

main().catch((error) => {
  // While stopping, steps fail because their children were ended.
  if (!stopping) say(`\nLevelbook could not start: ${error.message}`);
  void stop(1);
});
