import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create type alert_state as enum ('open', 'acknowledged', 'closed')`);
  await knex.raw(`create table flags (
    id uuid primary key,
    utility_id uuid not null,
    span_wire_id uuid not null,
    finding_id uuid not null,
    opened_at timestamptz not null default now(),
    closed_by_finding_id uuid,
    closed_at timestamptz,
    unique (utility_id, id),
    foreign key (utility_id, span_wire_id) references span_wires (utility_id, id),
    foreign key (utility_id, finding_id) references findings (utility_id, id),
    foreign key (utility_id, closed_by_finding_id) references findings (utility_id, id),
    check ((closed_at is null) = (closed_by_finding_id is null))
  )`);
  await knex.raw('create unique index flags_one_open on flags (span_wire_id) where closed_at is null');
  await secureTable(knex, 'flags', 'select, insert, update');
  await knex.raw(`create table alerts (
    id uuid primary key,
    utility_id uuid not null,
    flag_id uuid not null unique,
    finding_id uuid not null,
    span_wire_id uuid not null,
    state alert_state not null default 'open',
    opened_at timestamptz not null default now(),
    acknowledged_at timestamptz,
    acknowledged_by_person_id uuid,
    closed_at timestamptz,
    closed_by_person_id uuid,
    note text not null default '' check (length(note) <= 1000),
    version_number int not null default 1 check (version_number >= 1),
    unique (utility_id, id),
    foreign key (utility_id, flag_id) references flags (utility_id, id),
    foreign key (utility_id, finding_id) references findings (utility_id, id),
    foreign key (utility_id, span_wire_id) references span_wires (utility_id, id),
    foreign key (utility_id, acknowledged_by_person_id) references people (utility_id, id),
    foreign key (utility_id, closed_by_person_id) references people (utility_id, id),
    check ((state = 'closed') = (closed_at is not null) and (state <> 'acknowledged' or acknowledged_at is not null))
  )`);
  await knex.raw('create index alerts_by_state on alerts (utility_id, state, opened_at desc, id)');
  await secureTable(knex, 'alerts', 'select, insert, update');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table alerts');
  await knex.raw('drop table flags');
  await knex.raw('drop type alert_state');
}
