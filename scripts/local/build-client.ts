import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';

const sources = ['src', 'shared', 'public', 'index.html', 'vite.config.ts', 'package-lock.json'];

function newestMs(path: string): number {
  const found = statSync(path);
  if (!found.isDirectory()) return found.mtimeMs;
  return Math.max(found.mtimeMs, ...readdirSync(path).map((name) => newestMs(join(path, name))));
}

/** Builds the client when a source is newer than what is built; says whether it did. */
export function buildClient(projectDirectory: string): boolean {
  const built = join(projectDirectory, 'dist', 'index.html');
  const newest = Math.max(
    ...sources
      .map((name) => join(projectDirectory, name))
      .filter(existsSync)
      .map(newestMs),
  );
  if (existsSync(built) && statSync(built).mtimeMs >= newest) return false;
  process.stdout.write('Building the client …\n');
  const result = spawnSync(process.execPath, ['node_modules/vite/bin/vite.js', 'build', '--logLevel', 'warn'], {
    cwd: projectDirectory,
    stdio: ['ignore', 'inherit', 'inherit'],
  });
  if (result.status !== 0) throw new Error('the client does not build');
  return true;
}
