import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create table damper_types (
    id uuid primary key,
    utility_id uuid not null references utilities (id),
    name text not null check (length(name) between 1 and 80),
    mass_kg double precision not null check (mass_kg between 0.05 and 60),
    model jsonb not null check (model ->> 'kind' in ('halves', 'table')),
    source text not null,
    standing text not null,
    cost_amount numeric(12, 2) check (cost_amount >= 0),
    version_number int not null default 1 check (version_number >= 1),
    unique (utility_id, name),
    unique (utility_id, id)
  )`);
  await secureTable(knex, 'damper_types', 'select, insert, update, delete');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table damper_types');
}
