import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw('create extension if not exists postgis');
  await knex.raw(`do $$ begin
    if not exists (select from pg_roles where rolname = 'stillspan_app') then
      raise exception 'the group role stillspan_app is missing; create it with: create role stillspan_app nologin';
    end if;
  end $$`);
  await knex.raw('grant usage on schema public to stillspan_app');
  await knex.raw(`create function stillspan_current_utility_id() returns uuid language sql stable parallel safe
    as $$ select nullif(current_setting('stillspan.utility_id', true), '')::uuid $$`);
  await knex.raw(`create type person_role as enum ('engineer', 'crew', 'manager', 'safety-officer', 'admin')`);
  await knex.raw(`create type grade as enum ('calm', 'notice', 'act', 'urgent')`);
  await knex.raw(`create type outcome as enum ('steady', 'quiet', 'amplitude-limit', 'no-damper-data', 'refused')`);
  await knex.raw(`create type span_side as enum ('from', 'to')`);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop type span_side');
  await knex.raw('drop type outcome');
  await knex.raw('drop type grade');
  await knex.raw('drop type person_role');
  await knex.raw('drop function stillspan_current_utility_id()');
  await knex.raw('revoke usage on schema public from stillspan_app');
}
