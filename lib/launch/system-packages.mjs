/** Debian packages, installed where a file of theirs is missing. */
import { spawnSync } from 'node:child_process';
import fs from 'node:fs';
import { run } from './children.mjs';
import { findPostgres } from './postgres.mjs';
import { say, step } from './say.mjs';

const isThere = (file) => fs.existsSync(file);
const canImport = (module) => spawnSync('/usr/bin/python3', ['-I', '-c', `import ${module}`]).status === 0;

/** `essential`: nothing works without it. The site runs without the others, and says what it cannot do. */
const FOR_THE_SITE = [
  { name: 'postgresql', essential: true, isInstalled: () => findPostgres() !== null },
  {
    name: 'util-linux',
    essential: true,
    isInstalled: () => isThere('/usr/bin/setpriv') && isThere('/usr/bin/prlimit'),
  },
  { name: 'gcc', isInstalled: () => isThere('/usr/bin/gcc') },
  { name: 'libc6-dev', isInstalled: () => isThere('/usr/include/stdio.h') },
  { name: 'gfortran', isInstalled: () => isThere('/usr/bin/gfortran') },
  { name: 'python3', isInstalled: () => isThere('/usr/bin/python3') },
  { name: 'python3-numpy', isInstalled: () => canImport('numpy') },
  { name: 'bubblewrap', isInstalled: () => isThere('/usr/bin/bwrap') },
];
const FOR_TESTS = [
  { name: 'chromium', isInstalled: () => isThere('/usr/bin/chromium') },
  { name: 'python3-sympy', isInstalled: () => canImport('sympy') },
  { name: 'python3-scipy', isInstalled: () => canImport('scipy') },
  { name: 'valgrind', isInstalled: () => isThere('/usr/bin/valgrind') },
];

/** An own PostgreSQL elsewhere needs no server here. */
function wanted({ withTests, withServer }) {
  const all = withTests ? [...FOR_THE_SITE, ...FOR_TESTS] : FOR_THE_SITE;
  return all.filter((one) => withServer || one.name !== 'postgresql');
}

function administrator() {
  if (process.getuid() === 0) return [];
  return spawnSync('sudo', ['-n', 'true']).status === 0 ? ['sudo', '-n'] : null;
}

async function install(names) {
  const asAdministrator = administrator();
  if (!isThere('/usr/bin/apt-get') || !asAdministrator) return false;
  const apt = ['env', 'DEBIAN_FRONTEND=noninteractive', 'apt-get', '-q', '-o', 'DPkg::Lock::Timeout=120'];
  const [command, ...args] = [...asAdministrator, ...apt];
  await run(command, [...args, 'update'], { log: 'apt-update' });
  const flags = ['install', '-y', '--no-install-recommends', '--no-upgrade'];
  return (await run(command, [...args, ...flags, ...names], { log: 'apt-install' })) === 0;
}

/**
 * Sees to it that the system packages are there.
 * @throws {Error} when one is missing without which nothing works
 */
export async function ensureSystemPackages(needs) {
  const missing = () => wanted(needs).filter((one) => !one.isInstalled());
  const before = missing();
  if (before.length === 0) return;
  const names = before.map((one) => one.name);
  await step(`system packages ${names.join(', ')}`, async () =>
    (await install(names)) ? 'installed' : 'not installed',
  );

  const after = missing();
  if (after.length === 0) return;
  const command = `apt-get install --no-install-recommends ${after.map((one) => one.name).join(' ')}`;
  if (after.some((one) => one.essential)) {
    throw new Error(
      `System packages are missing, and could not be installed from here. As an administrator run:\n  ${command}`,
    );
  }
  say(
    `  Missing, so that some trials cannot run here: ${after.map((one) => one.name).join(', ')}. Install with:\n    ${command}`,
  );
}
