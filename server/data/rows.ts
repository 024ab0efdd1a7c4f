import { z } from 'zod';
import { toCamelCase } from '#shared/units/suffixes.ts';

/** A timestamptz column as it leaves the database layer: ISO 8601, UTC. */
export const instantColumn = z.date().transform((date) => date.toISOString());

type RawRow = Readonly<Record<string, unknown>>;

/** Renames the columns of a row to the names the code uses: `span_length_m` to `spanLengthM`. */
export function camelRow(row: RawRow): Record<string, unknown> {
  return Object.fromEntries(Object.entries(row).map(([column, value]) => [toCamelCase(column), value]));
}

/** Parses rows of one query; a row that does not fit is a defect of the query, so it throws. */
export function parseRows<S extends z.ZodType>(schema: S, rows: readonly RawRow[]): z.infer<S>[] {
  return rows.map((row) => schema.parse(camelRow(row)));
}
