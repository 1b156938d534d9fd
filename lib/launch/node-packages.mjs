/** The npm packages, exactly as the lock file has them. */
import fs from 'node:fs';
import path from 'node:path';
import { run } from './children.mjs';
import { ROOT } from './places.mjs';
import { step } from './say.mjs';

function readPackages(file) {
  try {
    return JSON.parse(fs.readFileSync(path.join(ROOT, file), 'utf8')).packages;
  } catch {
    return null;
  }
}

/**
 * Whether node_modules holds what package-lock.json names. npm writes its own list at the very end of an
 * installation, so that an interrupted one has none. Optional packages are those of other systems.
 */
function areInstalled() {
  const locked = readPackages('package-lock.json');
  const installed = readPackages('node_modules/.package-lock.json');
  if (!locked || !installed) return false;
  return Object.entries(locked).every(
    ([name, { version, integrity, optional }]) =>
      name === '' ||
      (installed[name] ? installed[name].version === version && installed[name].integrity === integrity : optional),
  );
}

/** @throws {Error} when npm fails */
export async function ensureNodePackages() {
  if (areInstalled()) return;
  await step('npm packages', async () => {
    const env = { ...process.env };
    // With "production" there, npm would leave out what the build needs.
    delete env.NODE_ENV;
    const args = ['ci', '--include=dev', '--no-audit', '--no-fund'];
    const npm = process.env.npm_execpath;
    const status = npm
      ? await run(process.execPath, [npm, ...args], { env, log: 'npm-ci' })
      : await run('npm', args, { env, log: 'npm-ci' });
    if (status !== 0) throw new Error('npm ci failed.');
  });
}
