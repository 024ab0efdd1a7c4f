import { createHash, randomBytes } from 'node:crypto';
import { chmodSync, existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { z } from 'zod';

const stateSchema = z.object({
  superuserPassword: z.string(),
  ownerPassword: z.string(),
  servicePassword: z.string(),
  sessionSecret: z.string(),
  oidcClientSecret: z.string(),
  ports: z.record(z.string(), z.number()),
});

/** Secrets and ports of a local installation, kept between starts in a file that only its owner reads. */
export type LocalState = z.infer<typeof stateSchema>;

function secret(): string {
  return randomBytes(24).toString('base64url');
}

/**
 * Where a local installation keeps its data. As root it lies where the postgres account can reach it, one folder for
 * each checkout; otherwise in the checkout.
 */
export function dataDirectory(projectDirectory: string): string {
  const configured = process.env['STILLSPAN_DATA_DIR'];
  if (configured !== undefined && configured !== '') return configured;
  if (process.getuid?.() !== 0) return join(projectDirectory, '.stillspan');
  const name = createHash('sha256').update(projectDirectory).digest('hex').slice(0, 10);
  return join('/var/lib/stillspan', name);
}

export function loadState(directory: string): LocalState {
  mkdirSync(directory, { recursive: true, mode: 0o711 });
  // The postgres account must pass through to its own folder; nothing else here is readable to it.
  chmodSync(directory, 0o711);
  const file = join(directory, 'local.json');
  if (existsSync(file)) return stateSchema.parse(JSON.parse(readFileSync(file, 'utf8')));
  const fresh: LocalState = {
    superuserPassword: secret(),
    ownerPassword: secret(),
    servicePassword: secret(),
    sessionSecret: secret() + secret(),
    oidcClientSecret: secret(),
    ports: {},
  };
  saveState(directory, fresh);
  return fresh;
}

export function saveState(directory: string, state: LocalState): void {
  writeFileSync(join(directory, 'local.json'), JSON.stringify(state, null, 2), { mode: 0o600 });
}
