import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create type structure_kind as enum ('dead-end', 'suspension')`);
  await knex.raw(`create table lines (
    id uuid primary key,
    utility_id uuid not null references utilities (id),
    name text not null check (length(name) between 1 and 120),
    voltage_v double precision check (voltage_v between 0 and 1500000),
    is_assumed boolean not null,
    import_run_id uuid,
    created_at timestamptz not null default now(),
    unique (utility_id, name),
    unique (utility_id, id),
    foreign key (utility_id, import_run_id) references import_runs (utility_id, id)
  )`);
  await knex.raw(`create table structures (
    id uuid primary key,
    utility_id uuid not null,
    line_id uuid not null,
    name text not null check (length(name) between 1 and 60),
    kind structure_kind not null,
    structure_height_m double precision not null check (structure_height_m between 2 and 400),
    ground_elevation_m double precision not null default 0 check (ground_elevation_m between -500 and 9000),
    geom geometry(Point, 4326) not null check (st_x(geom) between -180 and 180 and st_y(geom) between -90 and 90),
    is_assumed boolean not null,
    unique (line_id, name),
    unique (utility_id, id),
    foreign key (utility_id, line_id) references lines (utility_id, id) on delete cascade
  )`);
  await knex.raw('create index structures_geom on structures using gist (geom)');
  await secureTable(knex, 'lines', 'select, insert, update, delete');
  await secureTable(knex, 'structures', 'select, insert, update, delete');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table structures');
  await knex.raw('drop table lines');
  await knex.raw('drop type structure_kind');
}
