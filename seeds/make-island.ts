import { mkdirSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import { fileURLToPath } from 'node:url';
import { islandFiles } from './island/island-files.ts';

/** Writes the invented lines and terrain of the demo and the sample files; the same on every run. */
for (const [path, content] of islandFiles()) {
  const target = fileURLToPath(new URL(`../${path}`, import.meta.url));
  mkdirSync(dirname(target), { recursive: true });
  writeFileSync(target, content);
  process.stdout.write(`${path} ${content.length} characters\n`);
}
