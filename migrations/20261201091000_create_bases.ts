import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create table bases (
    id uuid primary key,
    utility_id uuid not null references utilities (id),
    name text not null check (length(name) between 1 and 80),
    version_number int not null check (version_number >= 1),
    spec jsonb not null,
    is_default boolean not null default false,
    created_by_person_id uuid,
    created_at timestamptz not null default now(),
    unique (utility_id, name, version_number),
    unique (utility_id, id),
    foreign key (utility_id, created_by_person_id) references people (utility_id, id)
  )`);
  await knex.raw('create unique index bases_one_default on bases (utility_id) where is_default');
  await secureTable(knex, 'bases', 'select, insert');
  // A version never changes; only which one is the default does.
  await knex.raw('grant update (is_default) on bases to stillspan_app');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table bases');
}
