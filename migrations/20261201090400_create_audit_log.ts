import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create table audit_log (
    id bigint generated always as identity primary key,
    utility_id uuid not null references utilities (id),
    at timestamptz not null default now(),
    person_id uuid,
    action text not null,
    thing_kind text not null,
    thing_id text not null,
    before jsonb,
    after jsonb,
    request_id text,
    foreign key (utility_id, person_id) references people (utility_id, id)
  )`);
  await knex.raw('create index audit_log_thing on audit_log (utility_id, thing_kind, thing_id, id)');
  // No update and no delete: the log only grows.
  await secureTable(knex, 'audit_log', 'select, insert');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table audit_log');
}
