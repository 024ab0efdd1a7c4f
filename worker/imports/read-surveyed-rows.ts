import { z } from 'zod';
import { structureHeightMSchema, tensionNSchema } from '#shared/contract/quantity.ts';
import { checkPosition } from './check-position.ts';
import type { Position } from './geodesic-path.ts';
import type { IssueList } from './issue-list.ts';
import type { RawRow } from './raw-row.ts';
import { checkRow, numeric, text, word } from './check-row.ts';

const finite = { error: 'must be a finite number' };

const structureSchema = z.object({
  line_name: text(120),
  voltage_kv: numeric(z.number(finite).min(0, 'must not be negative').max(1500, 'must be at most 1500').optional()),
  name: text(60),
  order: numeric(z.number({ error: (issue) => (issue.input === undefined ? 'is required' : finite.error) })),
  structure_kind: word(['dead-end', 'suspension']),
  structure_height_m: numeric(structureHeightMSchema),
  ground_elevation_m: numeric(
    z.number(finite).min(-500, 'must be at least -500').max(9000, 'must be at most 9000').default(0),
  ),
});
const wireSchema = z.object({
  line_name: text(120),
  name: text(20),
  from_structure: text(60),
  to_structure: text(60),
  wire_kind: word(['phase', 'earth']),
  conductor: text(80),
  conductor_standard: text(120).optional(),
  tension_n: numeric(tensionNSchema),
});
const allowed = {
  voltage_kv: '0 to 1500 kV',
  order: 'a number that sorts the structures along the line',
  structure_height_m: '2 to 400 m, height of the wire attachment above ground',
  ground_elevation_m: '-500 to 9000 m',
  tension_n: '100 to 500000 N',
};

export type StructureRow = z.infer<typeof structureSchema> & { readonly row: number; readonly position: Position };
export type WireRow = z.infer<typeof wireSchema> & { readonly row: number };

export interface SurveyedRows {
  readonly structures: readonly StructureRow[];
  readonly wires: readonly WireRow[];
  /** Lines with a row that was refused: they are not judged as a whole, which would only repeat the error. */
  readonly brokenLineNames: ReadonlySet<string>;
}

/** Columns that a surveyed CSV table must have. */
export const surveyedColumns = [
  'record',
  'line_name',
  'name',
  'order',
  'longitude_deg',
  'latitude_deg',
  'structure_kind',
  'structure_height_m',
  'from_structure',
  'to_structure',
  'wire_kind',
  'conductor',
  'tension_n',
] as const;

const coordinate = numeric(z.unknown());

function pointOf(raw: RawRow, issues: IssueList): Position | null {
  const { row, geometry, values } = raw;
  if (geometry === null) {
    const pair = [coordinate.parse(values['longitude_deg']), coordinate.parse(values['latitude_deg'])];
    return checkPosition(pair, { row, field: 'longitude_deg, latitude_deg' }, issues);
  }
  if (geometry.type === 'Point') return checkPosition(geometry.coordinates, { row, field: 'geometry' }, issues);
  issues.addError({ row, field: 'geometry', value: geometry.type, message: 'A structure needs a Point.' });
  return null;
}

interface Reading {
  readonly structures: StructureRow[];
  readonly wires: WireRow[];
  readonly brokenLineNames: Set<string>;
  readonly issues: IssueList;
}

function readStructure(raw: RawRow, { structures, issues }: Reading): boolean {
  const checked = checkRow(raw, { schema: structureSchema, allowed }, issues);
  const position = pointOf(raw, issues);
  if (checked === null || position === null) return false;
  structures.push({ ...checked, row: raw.row, position });
  return true;
}

function readWire(raw: RawRow, { wires, issues }: Reading): boolean {
  const checked = checkRow(raw, { schema: wireSchema, allowed }, issues);
  if (checked === null) return false;
  wires.push({ ...checked, row: raw.row });
  return true;
}

const recordSchema = word(['structure', 'wire']);

/** Sorts rows into structures and wires by the field that tells them apart, and checks each by itself. */
export function readSurveyedRows(rows: readonly RawRow[], recordField: string, issues: IssueList): SurveyedRows {
  const reading: Reading = { structures: [], wires: [], brokenLineNames: new Set(), issues };
  for (const raw of rows) {
    const record = recordSchema.safeParse(raw.values[recordField]);
    let isGood = false;
    if (!record.success) {
      const value = raw.values[recordField];
      issues.addError({
        row: raw.row,
        field: recordField,
        value,
        message: `${recordField} must be one of: structure, wire.`,
      });
    } else {
      isGood = record.data === 'structure' ? readStructure(raw, reading) : readWire(raw, reading);
    }
    if (!isGood) reading.brokenLineNames.add(String(raw.values['line_name'] ?? '').trim());
  }
  return reading;
}

/**
 * Refuses a table whose structures come after wires of the same line: such a file was cut or joined in a wrong order, and
 * a structure that is missing at the end would otherwise go unseen.
 */
export function checkTableOrder({ structures, wires }: SurveyedRows, issues: IssueList): void {
  const lastStructureRows = new Map<string, number>();
  for (const { line_name: lineName, row } of structures) lastStructureRows.set(lineName, row);
  for (const { line_name: lineName, row } of wires) {
    const structureRow = lastStructureRows.get(lineName) ?? 0;
    if (structureRow <= row) continue;
    issues.addError({
      row,
      field: 'record',
      value: 'wire',
      message: `Tables out of order: this wire of line "${lineName}" stands before its structure in row ${structureRow}. All structures of a line come before its wires.`,
    });
  }
}
