/** `npm run bench`: runs every tests/bench/*.bench.ts, one after the other, so that none disturbs another. */
import fs from 'node:fs';
import path from 'node:path';
import { endAllChildren, run } from './children.mjs';
import { ensureNodePackages } from './node-packages.mjs';
import { ROOT } from './places.mjs';
import { say, seconds } from './say.mjs';
import { ensureSystemPackages } from './system-packages.mjs';

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
  process.once(signal, () => void endAllChildren().then(() => process.exit(1)));
}

await ensureSystemPackages({ withTests: true, withServer: false });
await ensureNodePackages();

const folder = path.join(ROOT, 'tests', 'bench');
const wanted = process.argv.slice(2);
const files = (fs.existsSync(folder) ? fs.readdirSync(folder) : [])
  .filter((name) => name.endsWith('.bench.ts') && (wanted.length === 0 || wanted.some((word) => name.includes(word))))
  .sort();
if (files.length === 0) {
  say(`There is no benchmark${wanted.length ? ` with ${wanted.join(' or ')} in its name` : ''} in tests/bench.`);
  process.exit(1);
}

let failed = 0;
for (const name of files) {
  say(`\n${name}`);
  const since = Date.now();
  const status = await run(process.execPath, ['--conditions=react-server', '--import', 'tsx', path.join(folder, name)]);
  say(`  ${status === 0 ? 'done' : 'failed'} after ${seconds(Date.now() - since)}`);
  if (status !== 0) failed += 1;
}
process.exit(failed === 0 ? 0 : 1);
