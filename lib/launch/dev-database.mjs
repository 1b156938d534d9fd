/**
 * The databases of a developer: one to work with, one for tests. Runs until it is told to stop.
 *   node lib/launch/dev-database.mjs
 * The addresses stand in .data/database-url and .data/test-database-url.
 */
import path from 'node:path';
import { keepRunning } from './keep-running.mjs';
import { DATA, writePrivately } from './places.mjs';
import { startCluster } from './postgres.mjs';
import { say } from './say.mjs';

const CLUSTERS = [
  { name: 'pg', wishPort: 54329, durable: true, database: 'levelbook', file: 'database-url' },
  { name: 'test', wishPort: 54330, durable: false, database: 'postgres', file: 'test-database-url' },
];

const kept = [];
for (const { database, file, ...cluster } of CLUSTERS) {
  let port = null;
  const start = async () => {
    const running = await startCluster({
      ...cluster,
      wishPort: port ?? cluster.wishPort,
      samePort: port !== null,
    });
    port = running.port;
    running.ensureDatabase(database);
    writePrivately(path.join(DATA, file), `${running.url(database)}\n`);
    return running;
  };
  kept.push(await keepRunning({ name: `database server ${cluster.name}`, start }));
  say(`  ${cluster.name} answers on port ${port}; its address is in .data/${file}`);
}

async function stop(status) {
  await Promise.all(kept.map((one) => one.stop()));
  process.exit(status);
}
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.once(signal, () => void stop(0));
say(await Promise.race(kept.map((one) => one.gaveUp)));
await stop(1);
