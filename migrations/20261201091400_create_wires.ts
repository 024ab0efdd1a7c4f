import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create type wire_kind as enum ('phase', 'earth')`);
  await knex.raw(`create table wires (
    id uuid primary key,
    utility_id uuid not null,
    section_id uuid not null,
    name text not null check (length(name) between 1 and 20),
    kind wire_kind not null,
    conductor_type_id uuid not null,
    tension_n double precision not null check (tension_n between 100 and 500000),
    is_assumed boolean not null,
    version_number int not null default 1 check (version_number >= 1),
    unique (section_id, name),
    unique (utility_id, id),
    foreign key (utility_id, section_id) references sections (utility_id, id) on delete cascade,
    foreign key (utility_id, conductor_type_id) references conductor_types (utility_id, id)
  )`);
  await knex.raw('create index wires_conductor_type on wires (conductor_type_id)');
  await secureTable(knex, 'wires', 'select, insert, update, delete');
  await knex.raw(`create table span_wires (
    id uuid primary key,
    utility_id uuid not null,
    span_id uuid not null,
    wire_id uuid not null,
    section_id uuid not null,
    current_finding_id uuid,
    grade grade,
    utilisation_ratio double precision check (utilisation_ratio >= 0),
    assessed_at timestamptz,
    is_stale boolean not null default false,
    stale_reason text,
    unique (span_id, wire_id),
    unique (utility_id, id),
    foreign key (utility_id, span_id) references spans (utility_id, id) on delete cascade,
    foreign key (utility_id, wire_id) references wires (utility_id, id) on delete cascade,
    foreign key (utility_id, section_id) references sections (utility_id, id) on delete cascade,
    check ((current_finding_id is null) = (grade is null) and (grade is null) = (assessed_at is null)),
    check (is_stale = (stale_reason is not null))
  )`);
  await knex.raw('create index span_wires_section on span_wires (section_id)');
  await knex.raw('create index span_wires_wire on span_wires (wire_id)');
  await knex.raw('create index span_wires_by_grade on span_wires (utility_id, grade, utilisation_ratio, id)');
  await secureTable(knex, 'span_wires', 'select, insert, update, delete');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table span_wires');
  await knex.raw('drop table wires');
  await knex.raw('drop type wire_kind');
}
