/** Where the launcher keeps things. Everything it makes lies in `.data` of this clone, which Git ignores. */
import fs from 'node:fs';
import path from 'node:path';

export const ROOT = path.resolve(import.meta.dirname, '..', '..');
export const DATA = path.join(ROOT, '.data');

/** Makes `.data`; others may enter it (the database user must), the secrets in it are 0600. */
export function makeDataFolder() {
  fs.mkdirSync(DATA, { recursive: true, mode: 0o755 });
}

/** Writes a file that only its owner can read, whole or not at all. */
export function writePrivately(file, text) {
  const beside = `${file}.${process.pid}`;
  fs.writeFileSync(beside, text, { mode: 0o600 });
  fs.renameSync(beside, file);
}
