import { openDatabase } from '#server/data/database.ts';
import { openAsOwner } from '#server/data/migrate.ts';
import { loadConfig, loadOwnerDatabaseUrl } from '#server/platform/config.ts';
import { openFileStore } from '#server/platform/files.ts';
import { loadDemo } from '../demo/load-demo.ts';

const config = loadConfig();
const owner = openAsOwner(loadOwnerDatabaseUrl());
const database = openDatabase(config.DATABASE_URL);
const say = (sentence: string) => void process.stdout.write(`${sentence}\n`);
try {
  const files = openFileStore(config.STILLSPAN_FILES_DIR);
  const isLoaded = await loadDemo({ owner, database, files, issuer: config.OIDC_ISSUER_URL, say });
  if (isLoaded) say('The demo is loaded; its first assessment waits for the worker.');
} finally {
  await Promise.all([database.close(), owner.destroy()]);
}
