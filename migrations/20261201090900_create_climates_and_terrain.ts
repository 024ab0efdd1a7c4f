import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create table climates (
    id uuid primary key,
    utility_id uuid not null references utilities (id),
    name text not null check (length(name) between 1 and 80),
    sectors jsonb not null check (jsonb_typeof(sectors) = 'array' and jsonb_array_length(sectors) between 1 and 72),
    icing_hours_per_year_count double precision check (icing_hours_per_year_count between 0 and 8784),
    source text not null,
    version_number int not null default 1 check (version_number >= 1),
    unique (utility_id, name),
    unique (utility_id, id)
  )`);
  await secureTable(knex, 'climates', 'select, insert, update, delete');
  await knex.raw(`create table terrain_zones (
    id uuid primary key,
    utility_id uuid not null references utilities (id),
    name text not null check (length(name) between 1 and 80),
    roughness_m double precision not null check (roughness_m between 0.0001 and 3),
    geom geometry(MultiPolygon, 4326) not null check (st_isvalid(geom) and not st_isempty(geom)),
    version_number int not null default 1 check (version_number >= 1),
    unique (utility_id, name),
    unique (utility_id, id)
  )`);
  await knex.raw('create index terrain_zones_geom on terrain_zones using gist (geom)');
  await secureTable(knex, 'terrain_zones', 'select, insert, update, delete');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table terrain_zones');
  await knex.raw('drop table climates');
}
