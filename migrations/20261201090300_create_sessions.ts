import type { Knex } from 'knex';

/** Sign-in sessions as connect-pg-simple expects them; they hold no utility data. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`create table sign_in_sessions (
    sid varchar primary key collate "default",
    sess json not null,
    expire timestamp(6) not null
  )`);
  await knex.raw('create index sign_in_sessions_expire on sign_in_sessions (expire)');
  await knex.raw('grant select, insert, update, delete on sign_in_sessions to stillspan_app');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table sign_in_sessions');
}
