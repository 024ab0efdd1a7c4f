import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create type stored_file_kind as enum ('photo', 'import')`);
  await knex.raw(`create table stored_files (
    id uuid primary key,
    utility_id uuid not null references utilities (id),
    kind stored_file_kind not null,
    media_type text not null,
    byte_count bigint not null check (byte_count > 0),
    content_sha256 text not null check (content_sha256 ~ '^[0-9a-f]{64}$'),
    created_by_person_id uuid,
    created_at timestamptz not null default now(),
    unique (utility_id, id),
    foreign key (utility_id, created_by_person_id) references people (utility_id, id)
  )`);
  await secureTable(knex, 'stored_files', 'select, insert, delete');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table stored_files');
  await knex.raw('drop type stored_file_kind');
}
