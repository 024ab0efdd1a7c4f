import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create table people (
    id uuid primary key,
    utility_id uuid not null references utilities (id),
    issuer text not null,
    subject text not null,
    display_name text not null,
    email text not null check (email ~ '^[^@[:space:]]+@[^@[:space:]]+$'),
    last_signed_in_at timestamptz,
    created_at timestamptz not null default now(),
    unique (utility_id, issuer, subject),
    unique (utility_id, id)
  )`);
  await knex.raw(`create table person_roles (
    person_id uuid not null,
    utility_id uuid not null,
    role person_role not null,
    primary key (person_id, role),
    foreign key (utility_id, person_id) references people (utility_id, id) on delete cascade
  )`);
  await secureTable(knex, 'people', 'select, insert, update');
  await secureTable(knex, 'person_roles', 'select, insert, delete');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table person_roles');
  await knex.raw('drop table people');
}
