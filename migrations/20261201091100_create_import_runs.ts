import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create type import_state as enum ('queued', 'running', 'done', 'refused', 'failed')`);
  await knex.raw(`create table import_runs (
    id uuid primary key,
    utility_id uuid not null references utilities (id),
    file_id uuid not null,
    file_name text not null check (length(file_name) between 1 and 255),
    options jsonb not null,
    state import_state not null default 'queued',
    step text not null default 'waiting' check (step in ('waiting', 'reading', 'checking', 'saving', 'ended')),
    done_count int not null default 0 check (done_count >= 0),
    total_count int not null default 0 check (total_count >= 0),
    counts jsonb,
    errors jsonb not null default '[]',
    error_count int not null default 0 check (error_count >= 0),
    notices jsonb not null default '[]',
    extent_deg double precision[] check (array_length(extent_deg, 1) = 4),
    created_by_person_id uuid,
    created_at timestamptz not null default now(),
    ended_at timestamptz,
    unique (utility_id, id),
    foreign key (utility_id, file_id) references stored_files (utility_id, id),
    foreign key (utility_id, created_by_person_id) references people (utility_id, id),
    check ((state in ('done', 'refused', 'failed')) = (ended_at is not null))
  )`);
  await knex.raw('create index import_runs_newest on import_runs (utility_id, created_at desc, id)');
  await secureTable(knex, 'import_runs', 'select, insert, update');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table import_runs');
  await knex.raw('drop type import_state');
}
