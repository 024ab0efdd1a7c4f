import { migrateToEmpty, migrateToLatest, openAsOwner } from '#server/data/migrate.ts';
import { loadOwnerDatabaseUrl } from '#server/platform/config.ts';

const command = process.argv[2] ?? 'latest';
if (command !== 'latest' && command !== 'empty') {
  process.stderr.write(`migrate: unknown command "${command}"; use "latest" or "empty"\n`);
  process.exit(2);
}
const owner = openAsOwner(loadOwnerDatabaseUrl());
try {
  const ran = command === 'latest' ? await migrateToLatest(owner) : await migrateToEmpty(owner);
  for (const name of ran) process.stdout.write(`${command === 'latest' ? 'applied' : 'taken back'} ${name}\n`);
  if (ran.length === 0 && !process.argv.includes('--quiet')) process.stdout.write('nothing to migrate\n');
} finally {
  await owner.destroy();
}
