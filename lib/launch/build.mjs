/** The production build, made when a source differs from those of the last one. */
import crypto from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import { run } from './children.mjs';
import { ROOT } from './places.mjs';
import { step } from './say.mjs';

const FOLDERS = ['app', 'components', 'db', 'drizzle', 'lib', 'public', 'templates'];
const FILES = [
  'next.config.ts',
  'postcss.config.mjs',
  'proxy.ts',
  'instrumentation.ts',
  'tsconfig.json',
  'package-lock.json',
];
const STAMP = path.join(ROOT, '.next', 'built-from');

function filesBelow(folder) {
  const top = path.join(ROOT, folder);
  if (!fs.existsSync(top)) return [];
  return fs
    .readdirSync(top, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) => path.relative(ROOT, path.join(entry.parentPath, entry.name)));
}

function sourceHash() {
  const hash = crypto.createHash('sha256').update(process.version);
  // The launcher is no part of what it builds.
  const files = [...FOLDERS.flatMap(filesBelow), ...FILES].filter((file) => !file.startsWith('lib/launch/')).sort();
  for (const file of files) {
    const full = path.join(ROOT, file);
    if (fs.existsSync(full)) hash.update(`\0${file}\0`).update(fs.readFileSync(full));
  }
  return hash.digest('hex');
}

export function isBuilt() {
  return fs.existsSync(STAMP) && fs.readFileSync(STAMP, 'utf8') === sourceHash();
}

/** @throws {Error} when the build fails */
export async function ensureBuild() {
  if (isBuilt()) return;
  await step('production build', async () => {
    const hash = sourceHash();
    fs.rmSync(STAMP, { force: true });
    const env = { ...process.env, NODE_ENV: 'production', NEXT_TELEMETRY_DISABLED: '1' };
    const status = await run(process.execPath, ['node_modules/next/dist/bin/next', 'build'], { env, log: 'build' });
    if (status !== 0) throw new Error('The production build failed.');
    fs.writeFileSync(STAMP, hash);
  });
}
