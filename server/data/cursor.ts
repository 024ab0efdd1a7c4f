import { z } from 'zod';
import { invalidField } from '#server/platform/errors.ts';
import type { UtilityTransaction } from './database.ts';

export interface PageRequest {
  readonly limitCount: number;
  readonly cursor?: string | undefined;
}

const cursorSchema = z.tuple([z.union([z.string(), z.number(), z.null()]), z.string()]);

type Bindings = Parameters<UtilityTransaction['run']>[1];

/** A list read in pages: rows come by a sort key and, where it is equal, by id; rows without a key come last. */
export interface KeysetList<S extends z.ZodType> {
  readonly schema: S;
  readonly columns: string;
  readonly from: string;
  /** Fewer tables that suffice for order and conditions; the others are then joined for the rows of the page only. */
  readonly pickFrom?: string;
  readonly where: readonly string[];
  readonly bindings: NonNullable<Bindings>;
  readonly key: { readonly expression: string; readonly type: string; readonly direction: 'ascending' | 'descending' };
  readonly id: string;
  /** Type of the id column; uuid unless told otherwise. */
  readonly idType?: 'uuid' | 'bigint';
  /** From-clause whose rows are counted with the same conditions; null when counting costs too much. */
  readonly countFrom: string | null;
}

interface Page<T> {
  items: T[];
  nextCursor: string | null;
  totalCount: number | null;
}

function readCursor(cursor: string): z.infer<typeof cursorSchema> {
  try {
    return cursorSchema.parse(JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8')));
  } catch {
    throw invalidField('/query/cursor', 'is not a cursor that this list gave out');
  }
}

function afterCursor(
  { key, id, idType = 'uuid' }: Pick<KeysetList<z.ZodType>, 'key' | 'id' | 'idType'>,
  value: string | number | null,
): string {
  if (value === null) return `(${key.expression} is null and ${id} > :cursorId::${idType})`;
  const beyond = key.direction === 'ascending' ? '>' : '<';
  const bound = `:cursorKey::${key.type}`;
  return `(${key.expression} ${beyond} ${bound} or (${key.expression} = ${bound} and ${id} > :cursorId::${idType}) or ${key.expression} is null)`;
}

const keySchema = z.union([z.string(), z.number(), z.null()]);
const cursorColumns = z.object({ cursorKey: keySchema, cursorId: z.coerce.string() });

/** One page of a list and the cursor of the next. */
export async function keysetPage<S extends z.ZodType>(
  tx: UtilityTransaction,
  page: PageRequest,
  list: KeysetList<S>,
): Promise<Page<z.infer<S>>> {
  const conditions = [...list.where];
  const bindings: Record<string, unknown> & NonNullable<Bindings> = {
    ...list.bindings,
    limitCount: page.limitCount + 1,
  };
  if (page.cursor !== undefined) {
    const [cursorKey, cursorId] = readCursor(page.cursor);
    conditions.push(afterCursor(list, cursorKey));
    Object.assign(bindings, { cursorKey, cursorId });
  }
  const where = conditions.length === 0 ? '' : `where ${conditions.join(' and ')}`;
  const order = list.key.direction === 'ascending' ? 'asc' : 'desc';
  const both = z.looseObject({}).transform((row, context) => {
    const item = list.schema.safeParse(row);
    const cursor = cursorColumns.safeParse(row);
    if (item.success && cursor.success) return { item: item.data, cursor: cursor.data };
    context.addIssue({ code: 'custom', message: String(item.error ?? cursor.error) });
    return z.NEVER;
  });
  const { expression } = list.key;
  const rows = await tx.rows(
    both,
    `select ${list.columns}, picked.cursor_key, picked.cursor_id
     from (
       select (${expression})::text as cursor_key, ${list.id} as cursor_id, ${expression} as sort_key
       from ${list.pickFrom ?? list.from} ${where} order by ${expression} ${order} nulls last, ${list.id} limit :limitCount
     ) as picked, ${list.from}
     where ${list.id} = picked.cursor_id 
     order by picked.sort_key ${order} nulls last, picked.cursor_id`,
    bindings,
  );
  const shown = rows.slice(0, page.limitCount);
  const last = shown.at(-1)?.cursor;
  return {
    items: shown.map(({ item }) => item),
    nextCursor:
      rows.length > page.limitCount && last !== undefined
        ? Buffer.from(JSON.stringify([last.cursorKey, last.cursorId])).toString('base64url')
        : null,
    totalCount: await countRows(tx, list),
  };
}

async function countRows<S extends z.ZodType>(tx: UtilityTransaction, list: KeysetList<S>): Promise<number | null> {
  if (list.countFrom === null) return null;
  const where = list.where.length === 0 ? '' : `where ${list.where.join(' and ')}`;
  const row = await tx.first(
    z.object({ count: z.number() }),
    `select count(*)::int as count from ${list.countFrom} ${where}`,
    list.bindings,
  );
  return row?.count ?? null;
}
