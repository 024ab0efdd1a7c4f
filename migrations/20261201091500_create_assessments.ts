import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create type assessment_state as enum ('queued', 'running', 'done', 'failed', 'cancelled')`);
  await knex.raw(`create table assessments (
    id uuid primary key,
    utility_id uuid not null references utilities (id),
    title text not null check (length(title) <= 120),
    basis_id uuid not null,
    selection jsonb not null,
    cause text not null check (cause in ('engineer', 'field-log')),
    state assessment_state not null default 'queued',
    step text not null default 'waiting' check (step in ('waiting', 'freezing-input', 'computing', 'finishing', 'ended')),
    total_count int not null default 0 check (total_count >= 0),
    done_count int not null default 0 check (done_count between 0 and total_count),
    engine_version text,
    methods jsonb not null default '[]',
    created_by_person_id uuid,
    created_at timestamptz not null default now(),
    frozen_at timestamptz,
    started_at timestamptz,
    ended_at timestamptz,
    cancel_requested_at timestamptz,
    failure_detail text,
    unique (utility_id, id),
    foreign key (utility_id, basis_id) references bases (utility_id, id),
    foreign key (utility_id, created_by_person_id) references people (utility_id, id),
    check ((state in ('done', 'failed', 'cancelled')) = (ended_at is not null))
  )`);
  await knex.raw('create index assessments_newest on assessments (utility_id, created_at desc, id)');
  await secureTable(knex, 'assessments', 'select, insert, update');
  await knex.raw(`create table assessment_chunks (
    assessment_id uuid not null,
    chunk_index int not null check (chunk_index >= 0),
    utility_id uuid not null,
    span_wire_count int not null check (span_wire_count > 0),
    input jsonb not null,
    done_at timestamptz,
    primary key (assessment_id, chunk_index),
    foreign key (utility_id, assessment_id) references assessments (utility_id, id)
  )`);
  // The input is frozen: the application may only say that a chunk is done.
  await secureTable(knex, 'assessment_chunks', 'select, insert');
  await knex.raw('grant update (done_at) on assessment_chunks to stillspan_app');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table assessment_chunks');
  await knex.raw('drop table assessments');
  await knex.raw('drop type assessment_state');
}
