/** The parts of a running site: schema, demo, web server, worker. */
import net from 'node:net';
import { run, startChild } from './children.mjs';
import { freePort } from './ports.mjs';
import { until } from './processes.mjs';

/** Node with TypeScript. The condition lets files that belong on a server load outside Next. */
const TYPESCRIPT = ['--conditions=react-server', '--import', 'tsx'];

/** @throws {Error} when the program ends with another status than 0 */
export async function runProgram(file, env, log) {
  const status = await run(process.execPath, [...TYPESCRIPT, file], { env, log });
  if (status !== 0) throw new Error(`${file} failed.`);
}

/** The newest schema. */
export const migrateDatabase = (env) => runProgram('db/migrate.ts', env, 'migrate');

/** The demo's people and entries; does nothing that is done already. */
export const fillDemo = (env) => runProgram('db/seed/seed.ts', env, 'seed');

/** The server's greeting: its address is not the one to open, and we tell when it is ready. */
const GREETING = /^\s*$|^\s*(▲ Next\.js|- Local:|- Network:|✓ (Ready|Starting|Running))/;

async function answers(port, host) {
  const reachable = host === '0.0.0.0' ? '127.0.0.1' : host;
  try {
    await fetch(`http://${reachable}:${port}/api/health`, { signal: AbortSignal.timeout(5_000) });
    return true;
  } catch {
    return false;
  }
}

/** Resolves once the server answers, with whatever it says about its health. */
export async function startWeb({ env, host, port, production }) {
  const command = production ? 'start' : 'dev';
  const args = ['node_modules/next/dist/bin/next', command, '-H', host, '-p', String(port)];
  const part = startChild('web', process.execPath, args, {
    env,
    silence: GREETING,
    // The development server works in a child of its own.
    deathSignal: production ? 'KILL' : 'TERM',
  });
  let how = null;
  void part.ended.then((text) => (how = text));
  await until(() => how !== null || answers(port, host), 120_000, 100);
  if (how !== null) throw new Error(`the web server ended at once (${how})`);
  return part;
}

/** Whether a server listens there; one that is reached by a socket file is taken to. */
export function databaseListens(address) {
  const { hostname, port } = new URL(address);
  if (hostname === '') return true;
  return new Promise((resolve) => {
    const socket = net.connect({ host: hostname, port: Number(port || 5432), timeout: 3_000 });
    const answer = (is) => () => {
      socket.destroy();
      resolve(is);
    };
    socket.once('connect', answer(true)).once('error', answer(false)).once('timeout', answer(false));
  });
}

/**
 * What a site without a mail server is told instead: our own catcher at a free port.
 * @returns the settings that name it
 */
export async function catcherSettings() {
  return { SMTP_URL: `smtp://127.0.0.1:${await freePort(2525)}`, LEVELBOOK_MAIL_CATCHER: '1' };
}

/** Takes letters in and shows them; while the database is away it takes none, and they wait. */
export function startMailCatcher({ env }) {
  return startChild('mail catcher', process.execPath, [...TYPESCRIPT, 'mail-catcher.ts'], { env });
}

/** A worker without a database would only end again: it is started once the database listens. */
export async function startWorker({ env }) {
  await until(() => databaseListens(env.DATABASE_URL), Infinity, 1_000);
  return startChild('worker', process.execPath, [...TYPESCRIPT, 'worker.ts'], { env });
}
