import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create table utilities (
    id uuid primary key,
    code text not null unique check (code ~ '^[a-z][a-z0-9-]{1,30}$'),
    name text not null check (length(name) between 1 and 120),
    currency_code text not null check (currency_code ~ '^[A-Z]{3}$'),
    default_roughness_m double precision not null check (default_roughness_m between 0.0001 and 3),
    created_at timestamptz not null default now()
  )`);
  await knex.raw('alter table utilities enable row level security');
  await knex.raw('create policy utilities_own on utilities using (id = stillspan_current_utility_id())');
  await knex.raw('grant select on utilities to stillspan_app');
  // Sign-in knows a code before any utility is set, and the worker visits every utility in turn: ids only, no data.
  await knex.raw(`create function stillspan_utility_id_of_code(wanted text) returns uuid
    language sql stable security definer set search_path = public
    as $$ select id from utilities where code = wanted $$`);
  await knex.raw(`create function stillspan_utility_ids() returns setof uuid
    language sql stable security definer set search_path = public
    as $$ select id from utilities order by code $$`);
  for (const signature of ['stillspan_utility_id_of_code(text)', 'stillspan_utility_ids()']) {
    await knex.raw(`revoke all on function ${signature} from public`);
    await knex.raw(`grant execute on function ${signature} to stillspan_app`);
  }
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop function stillspan_utility_ids()');
  await knex.raw('drop function stillspan_utility_id_of_code(text)');
  await knex.raw('drop table utilities');
}
