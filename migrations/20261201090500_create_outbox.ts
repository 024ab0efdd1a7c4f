import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create table outbox (
    id bigint generated always as identity primary key,
    utility_id uuid not null references utilities (id),
    job_name text not null,
    payload jsonb not null,
    dedupe_key text not null,
    created_at timestamptz not null default now(),
    dispatched_at timestamptz,
    unique (utility_id, dedupe_key)
  )`);
  await knex.raw('create index outbox_waiting on outbox (utility_id, id) where dispatched_at is null');
  await secureTable(knex, 'outbox', 'select, insert, update, delete');
  await knex.raw(`create table idempotency_keys (
    utility_id uuid not null,
    person_id uuid not null,
    idempotency_key text not null check (length(idempotency_key) between 8 and 200),
    route_name text not null,
    request_hash text not null,
    status int,
    response jsonb,
    created_at timestamptz not null default now(),
    primary key (utility_id, person_id, idempotency_key),
    foreign key (utility_id, person_id) references people (utility_id, id)
  )`);
  await secureTable(knex, 'idempotency_keys', 'select, insert, update, delete');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table idempotency_keys');
  await knex.raw('drop table outbox');
}
