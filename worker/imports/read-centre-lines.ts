import { z } from 'zod';
import type { ImportOptions } from '#shared/contract/imports.ts';
import { checkPosition } from './check-position.ts';
import type { Position } from './geodesic-path.ts';
import type { IssueList } from './issue-list.ts';
import type { RawRow } from './raw-row.ts';
import { checkRow, numeric, text } from './check-row.ts';

/** Line geometry of one name: the parts of all features that bear it. */
export interface CentreLine {
  readonly row: number;
  readonly name: string;
  readonly voltageV: number;
  readonly parts: Position[][];
}

export interface CentreLineFields {
  readonly lineName: string;
  readonly voltageKV: string;
}

const voltPerKilovolt = 1000;
const cableName = /\bcables?\b|\bcbl\b/i;

/** Names of the properties to read, as chosen or as usual. */
export function centreLineFields(options: ImportOptions): CentreLineFields {
  return options.properties ?? { lineName: 'line_name', voltageKV: 'voltage_kv' };
}

function partsOf({ row, geometry }: RawRow, issues: IssueList): Position[][] | null {
  const isLine = geometry?.type === 'LineString' || geometry?.type === 'MultiLineString';
  const lists = geometry?.type === 'LineString' ? [geometry.coordinates] : geometry?.coordinates;
  if (!isLine || !Array.isArray(lists) || lists.length === 0) {
    const message = 'A centre line needs the geometry LineString or MultiLineString.';
    issues.addError({ row, field: 'geometry', value: geometry?.type ?? null, message });
    return null;
  }
  const errorCountBefore = issues.errorCount;
  const parts = lists.map((list: unknown, index) => {
    const field = `geometry part ${index + 1}`;
    if (!Array.isArray(list) || list.length < 2) {
      issues.addError({ row, field, value: list, message: 'A part of a line needs two points or more.' });
      return [];
    }
    return list.flatMap((pair: unknown, point) => {
      const position = checkPosition(pair, { row, field: `${field}, point ${point + 1}` }, issues);
      return position === null ? [] : [position];
    });
  });
  return issues.errorCount > errorCountBefore ? null : parts;
}

function addLine(line: CentreLine, lines: Map<string, CentreLine>, issues: IssueList): void {
  const { row, name, voltageV, parts } = line;
  const former = lines.get(name);
  if (former === undefined) {
    lines.set(name, line);
  } else if (former.voltageV === voltageV) {
    former.parts.push(...parts);
    const message = `A line of this name and voltage stands in feature or row ${former.row} already; both are taken as parts of one line.`;
    issues.addNotice({ row, field: 'line name', value: name, message });
  } else {
    const message = `A line of this name stands in feature or row ${former.row} with ${former.voltageV / voltPerKilovolt} kV; two lines need two names.`;
    issues.addError({ row, field: 'line name', value: name, message });
  }
}

/** Reads and checks each feature; features without a voltage are left out with a notice. */
export function readCentreLines(rows: readonly RawRow[], fields: CentreLineFields, issues: IssueList) {
  const schema = z.object({
    [fields.lineName]: text(120),
    [fields.voltageKV]: numeric(
      z
        .number({ error: 'must be a finite number' })
        .min(0, 'must not be negative')
        .max(1500, 'must be at most 1500')
        .optional(),
    ),
  });
  const lines = new Map<string, CentreLine>();
  let leftOutCount = 0;
  for (const raw of rows) {
    const { row } = raw;
    const checked = checkRow(raw, { schema, allowed: { [fields.voltageKV]: '0 to 1500 kV' } }, issues);
    const parts = partsOf(raw, issues);
    if (checked === null || parts === null) continue;
    const name = String(checked[fields.lineName]);
    const voltageKV = Number(checked[fields.voltageKV] ?? 0);
    if (voltageKV === 0) {
      leftOutCount += 1;
      const message = `Left out: "${name}" has no voltage, as a cable or a line out of use has.`;
      issues.addNotice({ row, field: fields.voltageKV, value: checked[fields.voltageKV], message });
      continue;
    }
    if (cableName.test(name)) {
      const message = 'The name speaks of a cable, but it has a voltage and is imported as an overhead line; check it.';
      issues.addNotice({ row, field: fields.lineName, value: name, message });
    }
    addLine({ row, name, voltageV: voltageKV * voltPerKilovolt, parts }, lines, issues);
  }
  return { lines: [...lines.values()], leftOutCount };
}
