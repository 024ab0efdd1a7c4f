import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create table findings (
    id uuid primary key,
    utility_id uuid not null,
    assessment_id uuid not null,
    span_wire_id uuid not null,
    chunk_index int not null,
    item_index int not null check (item_index >= 0),
    outcome outcome not null,
    grade grade not null,
    utilisation_ratio double precision check (utilisation_ratio >= 0),
    stress_pa double precision check (stress_pa >= 0),
    limit_stress_pa double precision check (limit_stress_pa > 0),
    frequency_hz double precision check (frequency_hz > 0),
    wind_speed_m_per_s double precision check (wind_speed_m_per_s > 0),
    amplitude_m double precision check (amplitude_m >= 0),
    life_years double precision check (life_years >= 0),
    reasons jsonb not null,
    warnings jsonb not null,
    result jsonb not null,
    assessed_at timestamptz not null default now(),
    unique (assessment_id, span_wire_id),
    unique (utility_id, id),
    foreign key (utility_id, assessment_id) references assessments (utility_id, id),
    foreign key (assessment_id, chunk_index) references assessment_chunks (assessment_id, chunk_index),
    foreign key (utility_id, span_wire_id) references span_wires (utility_id, id),
    check ((stress_pa is null) = (frequency_hz is null) and (stress_pa is null) = (limit_stress_pa is null))
  )`);
  await knex.raw('create index findings_span_wire on findings (span_wire_id, assessed_at desc)');
  await knex.raw('create index findings_worst on findings (assessment_id, grade desc, utilisation_ratio desc, id)');
  // Results are never overwritten and never deleted by the application.
  await secureTable(knex, 'findings', 'select, insert');
  await knex.raw(`alter table span_wires add constraint span_wires_current_finding
    foreign key (utility_id, current_finding_id) references findings (utility_id, id)`);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('alter table span_wires drop constraint span_wires_current_finding');
  await knex.raw('drop table findings');
}
