import { spawn, spawnSync } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { once } from 'node:events';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';

let clone: string;

// The lock belongs to the clone that the file lies in: each test has a clone of its own.
beforeEach(() => {
  clone = mkdtempSync(path.join(tmpdir(), 'clone-'));
  cpSync(path.resolve(import.meta.dirname, '../../../lib/launch'), path.join(clone, 'lib/launch'), { recursive: true });
  mkdirSync(path.join(clone, '.data'));
});
afterEach(() => rmSync(clone, { recursive: true }));

const program = (body: string) => [
  '--input-type=module',
  '--eval',
  `import { holderOf, releaseLock, takeLock } from ${JSON.stringify(path.join(clone, 'lib/launch/lock.mjs'))};\n${body}`,
];
const TAKE = 'console.log(takeLock("start")?.pid ?? "taken");';
const take = () => spawnSync(process.execPath, program(TAKE), { encoding: 'utf8' }).stdout.trim();

async function aHolder() {
  const holder = spawn(process.execPath, program(`${TAKE} setInterval(() => {}, 1000);`));
  const [said] = (await once(holder.stdout, 'data')) as [Buffer];
  expect(String(said).trim()).toBe('taken');
  return holder;
}

it('tells a second launcher who holds the lock', async () => {
  const holder = await aHolder();
  expect(take()).toBe(String(holder.pid));
  holder.kill('SIGKILL');
  await once(holder, 'exit');
});

it('is free again after its holder was killed', async () => {
  const holder = await aHolder();
  holder.kill('SIGKILL');
  await once(holder, 'exit');
  expect(take()).toBe('taken');
});

it('is not held by another program that got the same number later', () => {
  writeFileSync(path.join(clone, '.data/start.lock'), JSON.stringify({ pid: process.pid, startTime: 1 }));
  expect(take()).toBe('taken');
});

it('is not held by a file that was cut short', () => {
  writeFileSync(path.join(clone, '.data/start.lock'), '{"pid":');
  expect(take()).toBe('taken');
});
