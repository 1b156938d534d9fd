/** One launcher per clone and purpose, known by its process. */
import fs from 'node:fs';
import path from 'node:path';
import { DATA, makeDataFolder } from './places.mjs';
import { livingProcess } from './processes.mjs';

const fileOf = (name) => path.join(DATA, `${name}.lock`);

/** Who holds the lock: `{ pid, startTime, address? }`, or null. A number that another program got since holds nothing. */
export function holderOf(name) {
  try {
    const holder = JSON.parse(fs.readFileSync(fileOf(name), 'utf8'));
    return livingProcess(holder.pid)?.startTime === holder.startTime ? holder : null;
  } catch {
    return null;
  }
}

/**
 * Takes the lock for this process.
 * @returns null when it is ours now, otherwise its holder
 */
export function takeLock(name) {
  makeDataFolder();
  const file = fileOf(name);
  const mine = JSON.stringify({ pid: process.pid, startTime: livingProcess(process.pid).startTime });
  for (;;) {
    const beside = `${file}.${process.pid}`;
    fs.writeFileSync(beside, mine);
    try {
      // A link appears whole or not at all, and only where nothing is.
      fs.linkSync(beside, file);
      return null;
    } catch (error) {
      if (error.code !== 'EEXIST') throw error;
      const holder = holderOf(name);
      if (holder) return holder.pid === process.pid ? null : holder;
      fs.rmSync(file, { force: true });
    } finally {
      fs.rmSync(beside, { force: true });
    }
  }
}

/** Adds to what others read about the holder. */
export function tellOthers(name, facts) {
  const file = fileOf(name);
  fs.writeFileSync(file, JSON.stringify({ ...JSON.parse(fs.readFileSync(file, 'utf8')), ...facts }));
}

export function releaseLock(name) {
  if (holderOf(name)?.pid === process.pid) fs.rmSync(fileOf(name), { force: true });
}
