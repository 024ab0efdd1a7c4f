import { execFileSync } from 'node:child_process';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { openDatabase } from '#server/data/database.ts';
import { migrateToEmpty, migrateToLatest, openAsOwner } from '#server/data/migrate.ts';
import { asSuperuser } from '#scripts/local/postgres.ts';
import { makeNetwork } from '../support/network.ts';
import {
  createTestDatabase,
  sharedServices,
  startTestServices,
  type TestDatabase,
  type TestServices,
} from '../support/services.ts';

let services: TestServices;
let empty: TestDatabase;
let filled: TestDatabase;
const utilityId = '00000000-0000-4000-8000-00000000000a';
const otherId = '00000000-0000-4000-8000-00000000000b';

beforeAll(async () => {
  services = sharedServices() ?? (await startTestServices());
  empty = await createTestDatabase(services, { isEmpty: true });
  filled = await createTestDatabase(services);
  await asSuperuser(filled.superuserUrl, (client) =>
    client.query(
      `insert into utilities (id, code, name, currency_code, default_roughness_m)
       values ('${utilityId}', 'tern', 'Tern', 'EUR', 0.05), ('${otherId}', 'skua', 'Skua', 'EUR', 0.05)`,
    ),
  );
});
afterAll(async () => {
  await empty.drop();
  await filled.drop();
  await services.stop();
});

const dump = (url: string) =>
  execFileSync('pg_dump', ['--schema-only', '--no-owner', '--exclude-table=schema_migrations*', url], {
    encoding: 'utf8',
    maxBuffer: 64e6,
  }).replaceAll(/^\\(un)?restrict .*$/gm, '');
const countSchema = z.object({ count: z.coerce.number() });

async function rowsOf<S extends z.ZodType>(url: string, schema: S, sql: string): Promise<z.infer<S>[]> {
  return asSuperuser(url, async (client) => z.array(schema).parse((await client.query(sql)).rows));
}

describe('migrations', () => {
  it('from nothing, back to nothing and up again give the same schema', async () => {
    const owner = openAsOwner(empty.ownerUrl);
    await migrateToLatest(owner);
    const first = dump(empty.superuserUrl);
    await migrateToEmpty(owner);
    const left = await rowsOf(
      empty.superuserUrl,
      countSchema,
      `select count(*) from pg_tables where schemaname = 'public' and tablename not in ('spatial_ref_sys', 'schema_migrations', 'schema_migrations_lock')`,
    );
    expect(left[0]?.count).toBe(0);
    await migrateToLatest(owner);
    expect(dump(empty.superuserUrl)).toBe(first);
    await owner.destroy();
  });

  it('go down and up on a database with data in it', async () => {
    const database = openDatabase(filled.appUrl);
    await makeNetwork(database, utilityId);
    await database.close();
    const copy = await createTestDatabase(services);
    await asSuperuser(copy.superuserUrl, (client) =>
      client.query(
        `insert into utilities (id, code, name, currency_code, default_roughness_m) values ('${utilityId}', 'tern', 'Tern', 'EUR', 0.05)`,
      ),
    );
    const copied = openDatabase(copy.appUrl);
    await makeNetwork(copied, utilityId);
    await copied.close();
    const owner = openAsOwner(copy.ownerUrl);
    expect((await migrateToEmpty(owner)).length).toBeGreaterThan(15);
    expect((await migrateToLatest(owner)).length).toBeGreaterThan(15);
    await owner.destroy();
    await copy.drop();
  });
});

describe('row-level security', () => {
  it('stands on every table that names a utility, with a policy', async () => {
    const bare = await rowsOf(
      filled.superuserUrl,
      z.object({ table: z.string() }),
      `select tables.relname as table from pg_class as tables join pg_attribute as columns on columns.attrelid = tables.oid
       where tables.relkind = 'r' and columns.attname = 'utility_id'
         and (not tables.relrowsecurity or not exists (select from pg_policy where polrelid = tables.oid))`,
    );
    expect(bare).toEqual([]);
  });

  it('binds the role that the application connects as: no owner, no superuser, no bypass', async () => {
    const [role] = await rowsOf(
      filled.superuserUrl,
      z.object({ rolsuper: z.boolean(), rolbypassrls: z.boolean(), owned: z.coerce.number() }),
      `select rolsuper, rolbypassrls, (select count(*) from pg_class where relowner = pg_roles.oid) as owned
       from pg_roles where rolname = 'stillspan_service'`,
    );
    expect(role).toEqual({ rolsuper: false, rolbypassrls: false, owned: 0 });
  });

  it('shows nothing without a utility, and only one’s own with one; another’s rows can be neither written nor taken over', async () => {
    const client = new pg.Client({ connectionString: filled.appUrl });
    await client.connect();
    const count = async (table: string) =>
      z.array(countSchema).parse((await client.query(`select count(*) from ${table}`)).rows)[0]?.count;
    expect(await count('spans')).toBe(0);
    for (const [id, expected] of [
      [utilityId, 3],
      [otherId, 0],
    ] as const) {
      await client.query('begin');
      await client.query(`select set_config('stillspan.utility_id', $1, true)`, [id]);
      expect(await count('spans')).toBe(expected);
      expect(await count('utilities')).toBe(1);
      await client.query('rollback');
    }
    await client.query('begin');
    await client.query(`select set_config('stillspan.utility_id', $1, true)`, [otherId]);
    await expect(
      client.query(
        `insert into lines (id, utility_id, name, is_assumed) values (gen_random_uuid(), '${utilityId}', 'stolen', false)`,
      ),
    ).rejects.toThrow(/row-level security/);
    await client.query('rollback');
    await expect(client.query('update findings set grade = grade')).rejects.toThrow(/permission denied/);
    await expect(client.query('delete from audit_log')).rejects.toThrow(/permission denied/);
    await client.end();
  });
});

describe('columns', () => {
  it('that hold quantities carry their unit', async () => {
    const suffixes = /_(m|kg|kg_per_m|n|pa|nm2|per_k|deg|hz|m_per_s|ratio|years|amount|v|count|number|index)$/;
    const named = await rowsOf(
      filled.superuserUrl,
      z.object({ table_name: z.string(), column_name: z.string() }),
      `select table_name, column_name from information_schema.columns
       where table_schema = 'public' and data_type in ('double precision', 'numeric', 'real')
         and table_name not in ('geometry_columns', 'geography_columns', 'spatial_ref_sys')`,
    );
    expect(named.length).toBeGreaterThan(20);
    expect(named.filter(({ column_name }) => !suffixes.test(column_name))).toEqual([]);
  });
});
