import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create table sections (
    id uuid primary key,
    utility_id uuid not null,
    line_id uuid not null,
    name text not null check (length(name) between 1 and 130),
    order_index int not null check (order_index >= 0),
    ruling_span_m double precision not null check (ruling_span_m between 1 and 5000),
    section_length_m double precision not null check (section_length_m > 0),
    geom geometry(LineString, 4326) not null,
    is_assumed boolean not null,
    unique (line_id, order_index),
    unique (utility_id, id),
    foreign key (utility_id, line_id) references lines (utility_id, id) on delete cascade
  )`);
  await knex.raw('create index sections_geom on sections using gist (geom)');
  await knex.raw(`create table spans (
    id uuid primary key,
    utility_id uuid not null,
    section_id uuid not null,
    line_id uuid not null,
    order_index int not null check (order_index >= 0),
    from_structure_id uuid not null,
    to_structure_id uuid not null check (to_structure_id <> from_structure_id),
    span_length_m double precision not null check (span_length_m between 5 and 5000),
    bearing_deg double precision not null check (bearing_deg >= 0 and bearing_deg < 360),
    mean_wire_height_m double precision not null check (mean_wire_height_m between 1 and 400),
    roughness_m double precision not null check (roughness_m between 0.0001 and 3),
    terrain_zone_id uuid references terrain_zones (id) on delete set null,
    geom geometry(LineString, 4326) not null,
    is_assumed boolean not null,
    unique (section_id, order_index),
    unique (utility_id, id),
    foreign key (utility_id, section_id) references sections (utility_id, id) on delete cascade,
    foreign key (utility_id, from_structure_id) references structures (utility_id, id),
    foreign key (utility_id, to_structure_id) references structures (utility_id, id)
  )`);
  await knex.raw('create index spans_geom on spans using gist (geom)');
  await knex.raw('create index spans_from_structure on spans (from_structure_id)');
  await knex.raw('create index spans_to_structure on spans (to_structure_id)');
  await knex.raw('create index spans_terrain_zone on spans (terrain_zone_id)');
  await knex.raw('create index spans_line on spans (line_id)');
  await secureTable(knex, 'sections', 'select, insert, update, delete');
  await secureTable(knex, 'spans', 'select, insert, update, delete');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table spans');
  await knex.raw('drop table sections');
}
