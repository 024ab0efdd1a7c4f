import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create type placement_state as enum ('planned', 'as-built')`);
  await knex.raw(`create table placements (
    id uuid primary key,
    utility_id uuid not null,
    span_wire_id uuid not null,
    side span_side not null,
    damper_type_id uuid not null,
    distance_m double precision not null check (distance_m between 0.05 and 50),
    planned_distance_m double precision check (planned_distance_m between 0.05 and 50),
    state placement_state not null,
    replaces_placement_id uuid,
    started_at timestamptz not null,
    ended_at timestamptz check (ended_at >= started_at),
    logged_by_person_id uuid,
    photo_file_id uuid,
    note text not null default '' check (length(note) <= 1000),
    version_number int not null default 1 check (version_number >= 1),
    unique (utility_id, id),
    foreign key (utility_id, span_wire_id) references span_wires (utility_id, id),
    foreign key (utility_id, damper_type_id) references damper_types (utility_id, id),
    foreign key (utility_id, replaces_placement_id) references placements (utility_id, id),
    foreign key (utility_id, logged_by_person_id) references people (utility_id, id),
    foreign key (utility_id, photo_file_id) references stored_files (utility_id, id)
  )`);
  // Two clamps cannot sit within the same centimetre of one wire.
  await knex.raw(`create unique index placements_one_at_a_distance
    on placements (span_wire_id, side, state, (round(distance_m * 100))) where ended_at is null`);
  await secureTable(knex, 'placements', 'select, insert, update');
  await knex.raw(`create table field_logs (
    id uuid primary key,
    utility_id uuid not null,
    placement_id uuid not null,
    person_id uuid not null,
    fitted_at timestamptz not null,
    logged_at timestamptz not null default now(),
    grade_before grade,
    assessment_id uuid,
    request_hash text not null,
    foreign key (utility_id, placement_id) references placements (utility_id, id),
    foreign key (utility_id, person_id) references people (utility_id, id),
    foreign key (utility_id, assessment_id) references assessments (utility_id, id)
  )`);
  await knex.raw('create index field_logs_newest on field_logs (utility_id, logged_at desc, id)');
  await secureTable(knex, 'field_logs', 'select, insert');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table field_logs');
  await knex.raw('drop table placements');
  await knex.raw('drop type placement_state');
}
