import { fileURLToPath } from 'node:url';
import knexFactory, { type Knex } from 'knex';

const directory = fileURLToPath(new URL('../../migrations', import.meta.url));

/** Opens the database as its owner, for migrations. */
export function openAsOwner(ownerUrl: string): Knex {
  return knexFactory({
    client: 'pg',
    connection: ownerUrl,
    pool: { min: 0, max: 2 },
    migrations: { directory, loadExtensions: ['.ts'], tableName: 'schema_migrations' },
  });
}

/** Brings the schema up to date; returns the names of the migrations that ran. */
export async function migrateToLatest(owner: Knex): Promise<string[]> {
  const [, ran]: [number, string[]] = await owner.migrate.latest();
  return ran;
}

/** Takes back every migration; used by tests and by an operator who empties a trial database. */
export async function migrateToEmpty(owner: Knex): Promise<string[]> {
  const [, ran]: [number, string[]] = await owner.migrate.rollback(undefined, true);
  return ran;
}
