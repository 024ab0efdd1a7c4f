import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create table conductor_types (
    id uuid primary key,
    utility_id uuid not null references utilities (id),
    name text not null check (length(name) between 1 and 80),
    standard text not null check (length(standard) between 1 and 120),
    kind text not null,
    diameter_m double precision not null check (diameter_m between 0.003 and 0.1),
    mass_kg_per_m double precision not null check (mass_kg_per_m between 0.02 and 12),
    rated_strength_n double precision not null check (rated_strength_n between 500 and 2000000),
    aluminium_layer_count int not null check (aluminium_layer_count between 0 and 8),
    outer_strand_diameter_m double precision check (outer_strand_diameter_m between 0.0005 and 0.02),
    outer_strand_modulus_pa double precision not null check (outer_strand_modulus_pa between 3e10 and 2.5e11),
    bending_stiffness_min_nm2 double precision check (bending_stiffness_min_nm2 > 0),
    bending_stiffness_max_nm2 double precision,
    modulus_pa double precision check (modulus_pa between 2e10 and 2.5e11),
    thermal_expansion_per_k double precision check (thermal_expansion_per_k between 5e-6 and 3e-5),
    source text not null,
    standing text not null,
    as_published jsonb not null,
    check (bending_stiffness_max_nm2 is null or bending_stiffness_max_nm2 >= bending_stiffness_min_nm2),
    unique (utility_id, name, standard),
    unique (utility_id, id)
  )`);
  await secureTable(knex, 'conductor_types', 'select, insert, update, delete');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table conductor_types');
}
