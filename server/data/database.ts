import knexFactory, { type Knex } from 'knex';
import { z } from 'zod';
import { translateDatabaseError } from './database-errors.ts';
import { parseRows } from './rows.ts';

/** Who acts: every read and write of utility data happens for one utility, and changes name the person and request. */
export interface Actor {
  readonly utilityId: string;
  readonly personId: string | null;
  readonly requestId: string | null;
}

type Bindings = Readonly<
  Record<string, string | number | boolean | Date | null | readonly string[] | readonly number[]>
>;

/** One transaction bound to one utility; `withUtility` is the only way to get one. */
export interface UtilityTransaction {
  readonly actor: Actor;
  /** Rows of a query with named bindings (`:name`), parsed by the schema, columns renamed to camel case. */
  rows<S extends z.ZodType>(schema: S, sql: string, bindings?: Bindings): Promise<z.infer<S>[]>;
  /** The first row, or null. */
  first<S extends z.ZodType>(schema: S, sql: string, bindings?: Bindings): Promise<z.infer<S> | null>;
  /** Runs a statement; returns how many rows it touched. */
  run(sql: string, bindings?: Bindings): Promise<number>;
}

export interface Database {
  withUtility<T>(actor: Actor, work: (tx: UtilityTransaction) => Promise<T>): Promise<T>;
  /** Ids of all utilities; holds no data of theirs. */
  utilityIds(): Promise<string[]>;
  utilityIdOfCode(code: string): Promise<string | null>;
  ping(): Promise<void>;
  close(): Promise<void>;
}

const rawResult = z.object({ rows: z.array(z.record(z.string(), z.unknown())), rowCount: z.number().nullable() });

function bindTransaction(trx: Knex.Transaction, actor: Actor): UtilityTransaction {
  const send = async (sql: string, bindings: Bindings = {}) => {
    try {
      return rawResult.parse(await trx.raw(sql, { ...bindings }));
    } catch (error) {
      throw translateDatabaseError(error);
    }
  };
  return {
    actor,
    rows: async (schema, sql, bindings) => parseRows(schema, (await send(sql, bindings)).rows),
    first: async (schema, sql, bindings) => parseRows(schema, (await send(sql, bindings)).rows.slice(0, 1))[0] ?? null,
    run: async (sql, bindings) => (await send(sql, bindings)).rowCount ?? 0,
  };
}

/** Opens the pool of the application role. */
export function openDatabase(url: string, poolSizeCount = 10): Database {
  const knex = knexFactory({ client: 'pg', connection: url, pool: { min: 0, max: poolSizeCount } });
  const ids = async (sql: string, bindings: Bindings = {}) =>
    parseRows(z.object({ id: z.uuid().nullable() }), rawResult.parse(await knex.raw(sql, { ...bindings })).rows);
  return {
    withUtility: (actor, work) =>
      knex.transaction(async (trx) => {
        await trx.raw(`select set_config('stillspan.utility_id', ?, true)`, [actor.utilityId]);
        return work(bindTransaction(trx, actor));
      }),
    utilityIds: async () =>
      (await ids('select stillspan_utility_ids() as id')).flatMap(({ id }) => (id === null ? [] : [id])),
    utilityIdOfCode: async (code) =>
      (await ids('select stillspan_utility_id_of_code(:code) as id', { code }))[0]?.id ?? null,
    ping: async () => {
      await knex.raw('select 1');
    },
    close: () => knex.destroy(),
  };
}
