/** Child processes that end with the launcher, however it ends. */
import { spawn } from 'node:child_process';
import fs from 'node:fs';
import path from 'node:path';
import { DATA, ROOT } from './places.mjs';
import { until } from './processes.mjs';
import { say } from './say.mjs';

const running = new Set();
let closed = false;

/** Ends the child and all that it started; a session of its own makes it a group. */
function signalGroup(child, signal) {
  try {
    process.kill(-child.pid, signal);
  } catch {
    // It has ended meanwhile.
  }
}

function spawnBound(command, args, { deathSignal = 'KILL', ...options }) {
  if (closed) throw new Error('the launcher is stopping');
  // The kernel ends the child when we die, even of kill -9; its own session keeps the terminal's Ctrl-C from it.
  const child = spawn('setpriv', ['--pdeathsig', deathSignal, '--', command, ...args], {
    cwd: ROOT,
    detached: true,
    ...options,
  });
  running.add(child);
  const ended = new Promise((resolve) => {
    child.once('error', (error) => resolve({ status: 1, how: error.message }));
    child.once('exit', (code, signal) =>
      resolve({ status: code ?? 1, how: signal ? `signal ${signal}` : `status ${code}` }),
    );
  }).finally(() => {
    running.delete(child);
    // What it started and left behind goes with it.
    signalGroup(child, 'SIGKILL');
  });
  return { child, ended };
}

/** Sends every line of a stream to `write`. */
function eachLine(stream, write) {
  let rest = '';
  stream.setEncoding('utf8');
  stream.on('data', (text) => {
    const lines = (rest + text).split('\n');
    rest = lines.pop();
    lines.forEach(write);
  });
  stream.on('end', () => rest && write(rest));
}

/**
 * Starts a part of the site that runs until it is stopped; its output appears with its name before each line.
 * @param silence     lines that tell nobody anything
 * @param deathSignal sent when we die; TERM for a part that must end children of its own
 * @returns {{pid: number, ended: Promise<string>, stop: () => Promise<void>}}
 */
export function startChild(name, command, args, { env, silence = /^\s*$/, deathSignal }) {
  const { child, ended } = spawnBound(command, args, { env, deathSignal, stdio: ['ignore', 'pipe', 'pipe'] });
  for (const stream of [child.stdout, child.stderr])
    eachLine(stream, (line) => silence.test(line) || say(`[${name}] ${line}`));
  let over = false;
  const how = ended.then((end) => {
    over = true;
    return end.how;
  });
  const stop = async () => {
    if (over) return;
    child.kill('SIGTERM');
    if (!(await until(() => over, 5_000))) signalGroup(child, 'SIGKILL');
    await how;
  };
  return { pid: child.pid, ended: how, stop };
}

/**
 * Runs a command to its end.
 * @param log  name of a file below `.data/logs` that takes its output, shown only when the command fails;
 *   without it the output goes to our own
 * @returns {Promise<number>} its exit status
 */
export async function run(command, args, { env = process.env, log } = {}) {
  if (!log) return (await spawnBound(command, args, { env, stdio: ['ignore', 'inherit', 'inherit'] }).ended).status;
  const file = path.join(DATA, 'logs', `${log}.log`);
  fs.mkdirSync(path.dirname(file), { recursive: true });
  const output = fs.openSync(file, 'w');
  const { ended } = spawnBound(command, args, { env, stdio: ['ignore', output, output] });
  const { status, how } = await ended;
  fs.closeSync(output);
  if (status !== 0 && !closed) {
    const tail = fs.readFileSync(file, 'utf8').trimEnd().split('\n').slice(-60).join('\n');
    say(`${tail}\n  ${path.basename(command)} ended with ${how}; all of its output is in ${file}`);
  }
  return status;
}

/** From here on no child starts, and one that ends is no news: we are stopping. */
export function letNoneStart() {
  closed = true;
}

/** Ends every child at once; for a stop in the middle of the set-up. */
export async function endAllChildren() {
  letNoneStart();
  for (const child of running) signalGroup(child, 'SIGTERM');
  if (await until(() => running.size === 0, 3_000)) return;
  for (const child of running) signalGroup(child, 'SIGKILL');
  await until(() => running.size === 0, 2_000);
}
