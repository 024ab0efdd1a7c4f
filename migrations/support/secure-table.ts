import type { Knex } from 'knex';

/**
 * Row-level security for a table of utility data: rows of the utility that the transaction has set, no others, and only
 * the named rights for the application role. The owner of the table is not bound, so the application never owns one.
 */
export async function secureTable(knex: Knex, table: string, rights: string): Promise<void> {
  await knex.raw(`alter table ${table} enable row level security`);
  await knex.raw(
    `create policy ${table}_own_utility on ${table}
       using (utility_id = stillspan_current_utility_id()) with check (utility_id = stillspan_current_utility_id())`,
  );
  await knex.raw(`grant ${rights} on ${table} to stillspan_app`);
}
