/* `npm run bench [name]`: runs the benches one after another and prints what they measured. */
import { spawnSync } from 'node:child_process';
import { readdirSync } from 'node:fs';
import { ensureDebianPackages, ensureNpmPackages, projectDirectory, requireNode } from './setup.mjs';

requireNode();
ensureNpmPackages();
ensureDebianPackages({ wantsBrowser: true });
const directory = `${projectDirectory}tests/bench/`;
const wanted = process.argv[2] ?? '';
const benches = readdirSync(directory).filter((name) => name.endsWith('.bench.ts') && name.includes(wanted));
let failedCount = 0;
for (const name of benches.sort()) {
  process.stdout.write(`\n== ${name}\n`);
  const result = spawnSync(process.execPath, ['--import', 'tsx', `${directory}${name}`], {
    cwd: projectDirectory,
    stdio: 'inherit',
  });
  if (result.status !== 0) failedCount += 1;
}
process.exitCode = failedCount === 0 && benches.length > 0 ? 0 : 1;
