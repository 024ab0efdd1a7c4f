import { readdir } from 'node:fs/promises';
import knexFactory, { type Knex } from 'knex';
import { z } from 'zod';

const directory = new URL('../../migrations/', import.meta.url);
type Step = (knex: Knex) => Promise<void>;
const migrationSchema = z.object({
  up: z.custom<Step>((value) => typeof value === 'function'),
  down: z.custom<Step>((value) => typeof value === 'function'),
});

/** Reads the migrations ourselves: Knex's own loader knows neither TypeScript nor the module loader of the tests. */
const migrationSource: Knex.MigrationSource<string> = {
  getMigrations: async () => (await readdir(directory)).filter((name) => /^\d{14}_\w+\.ts$/.test(name)).sort(),
  getMigrationName: (name) => name,
  getMigration: async (name) => migrationSchema.parse({ ...(await import(new URL(name, directory).href)) }),
};

/** Opens the database as its owner, for migrations. */
export function openAsOwner(ownerUrl: string): Knex {
  return knexFactory({
    client: 'pg',
    connection: ownerUrl,
    pool: { min: 0, max: 2 },
    migrations: { migrationSource, tableName: 'schema_migrations' },
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
