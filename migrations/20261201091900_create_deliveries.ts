import type { Knex } from 'knex';
import { secureTable } from './support/secure-table.ts';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create type delivery_state as enum ('waiting', 'sent', 'failed')`);
  await knex.raw(`create table deliveries (
    id uuid primary key,
    utility_id uuid not null,
    person_id uuid not null,
    assessment_id uuid not null,
    is_digest boolean not null,
    state delivery_state not null default 'waiting',
    attempt_count int not null default 0 check (attempt_count >= 0),
    sent_at timestamptz,
    failure_detail text,
    created_at timestamptz not null default now(),
    unique (utility_id, id),
    foreign key (utility_id, person_id) references people (utility_id, id),
    foreign key (utility_id, assessment_id) references assessments (utility_id, id),
    check ((state = 'sent') = (sent_at is not null))
  )`);
  await secureTable(knex, 'deliveries', 'select, insert, update');
  await knex.raw(`create table delivery_alerts (
    delivery_id uuid not null,
    alert_id uuid not null,
    person_id uuid not null,
    utility_id uuid not null,
    primary key (alert_id, person_id),
    foreign key (utility_id, delivery_id) references deliveries (utility_id, id),
    foreign key (utility_id, alert_id) references alerts (utility_id, id)
  )`);
  await knex.raw('create index delivery_alerts_delivery on delivery_alerts (delivery_id)');
  await secureTable(knex, 'delivery_alerts', 'select, insert');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table delivery_alerts');
  await knex.raw('drop table deliveries');
  await knex.raw('drop type delivery_state');
}
