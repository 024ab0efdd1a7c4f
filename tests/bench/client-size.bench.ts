import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';
import { z } from 'zod';
import { projectDirectory } from '#scripts/setup.mjs';

/*
 * JavaScript that must arrive before the map is usable, compressed as a server sends it: the entry, the map page and all
 * that they import statically. The aim is 350 kB.
 */
const manifestSchema = z.record(
  z.string(),
  z.object({ file: z.string(), imports: z.array(z.string()).optional(), isEntry: z.boolean().optional() }),
);

execFileSync(
  process.execPath,
  [
    join(projectDirectory, 'node_modules/vite/bin/vite.js'),
    'build',
    '--manifest',
    '--logLevel',
    'error',
    '--outDir',
    '.stillspan/bench-dist',
    '--emptyOutDir',
  ],
  {
    cwd: projectDirectory,
    stdio: 'inherit',
  },
);
const directory = join(projectDirectory, '.stillspan/bench-dist');
const manifest = manifestSchema.parse(JSON.parse(readFileSync(join(directory, '.vite/manifest.json'), 'utf8')));
const wanted = new Set<string>();
const visit = (key: string): void => {
  if (wanted.has(key)) return;
  wanted.add(key);
  for (const next of manifest[key]?.imports ?? []) visit(next);
};
for (const [key, { isEntry }] of Object.entries(manifest))
  if (isEntry === true || key === 'src/views/map/MapView.vue') visit(key);
let totalBytes = 0;
for (const key of wanted) {
  const file = manifest[key]?.file ?? '';
  if (!file.endsWith('.js')) continue;
  const bytes = gzipSync(readFileSync(join(directory, file))).length;
  totalBytes += bytes;
  process.stdout.write(`${(bytes / 1000).toFixed(1).padStart(7)} kB  ${file}\n`);
}
process.stdout.write(`${(totalBytes / 1000).toFixed(1)} kB gzip before the map is usable (aim 350)\n`);
