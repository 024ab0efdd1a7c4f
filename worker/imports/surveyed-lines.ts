import type { ConductorLookup } from './conductor-lookup.ts';
import { geodesicPath } from './geodesic-path.ts';
import type { IssueList } from './issue-list.ts';
import type { LineDraft, SectionDraft, StructureDraft, WireDraft } from './line-draft.ts';
import { shortestSpanM, longestSpanM } from './span-limits.ts';
import { assignWires } from './assign-wires.ts';
import type { StructureRow, SurveyedRows, WireRow } from './read-surveyed-rows.ts';

const voltPerKilovolt = 1000;

function groupByLine<R extends { readonly line_name: string }>(rows: readonly R[]): Map<string, R[]> {
  const groups = new Map<string, R[]>();
  for (const row of rows) {
    const group = groups.get(row.line_name);
    if (group === undefined) groups.set(row.line_name, [row]);
    else group.push(row);
  }
  return groups;
}

function reportTwins(rows: readonly StructureRow[], field: 'name' | 'order', issues: IssueList): void {
  const seen = new Map<string | number, number>();
  for (const structure of rows) {
    const first = seen.get(structure[field]);
    if (first === undefined) seen.set(structure[field], structure.row);
    else {
      const message = `Line "${structure.line_name}" has a structure with this ${field} already, in row ${first}; each ${field} may stand once a line.`;
      issues.addError({ row: structure.row, field, value: structure[field], message });
    }
  }
}

function checkEnds(rows: readonly StructureRow[], issues: IssueList): void {
  const [first] = rows;
  const last = rows[rows.length - 1];
  if (first === undefined || last === undefined) return;
  if (rows.length < 2) {
    issues.addError({
      row: first.row,
      field: 'line_name',
      value: first.line_name,
      message: 'A line needs two structures or more.',
    });
    return;
  }
  for (const end of [first, last]) {
    if (end.structure_kind === 'dead-end') continue;
    const message = `Structure "${end.name}" ends the line "${end.line_name}", so it must be a dead-end.`;
    issues.addError({ row: end.row, field: 'structure_kind', value: end.structure_kind, message });
  }
}

function checkSpanLengths(rows: readonly StructureRow[], issues: IssueList): void {
  rows.slice(1).forEach((to, index) => {
    const from = rows[index];
    if (from === undefined) return;
    const { lengthM } = geodesicPath(from.position, to.position);
    if (lengthM >= shortestSpanM && lengthM <= longestSpanM) return;
    issues.addError({
      row: to.row,
      field: 'geometry',
      value: `${lengthM.toFixed(1)} m`,
      message: `The span from "${from.name}" to "${to.name}" is ${lengthM.toFixed(1)} m long; allowed: ${shortestSpanM} to ${longestSpanM} m. Check coordinates and order.`,
    });
  });
}

function voltageOf(rows: readonly StructureRow[], issues: IssueList): number | null {
  const stated = rows.filter((structure) => structure.voltage_kv !== undefined);
  const first = stated[0]?.voltage_kv;
  if (first === undefined) return null;
  const other = stated.find((structure) => structure.voltage_kv !== first);
  if (other !== undefined) {
    const message = `The line "${other.line_name}" has ${first} kV in row ${stated[0]?.row ?? 0}; a line has one voltage.`;
    issues.addError({ row: other.row, field: 'voltage_kv', value: other.voltage_kv, message });
  }
  return first * voltPerKilovolt;
}

/** Dead-end to dead-end, as indexes into the structures of the line. */
function sectionIndexes(rows: readonly StructureRow[]): number[][] {
  const sections: number[][] = [];
  let current: number[] = [0];
  rows.slice(1).forEach((structure, index) => {
    current.push(index + 1);
    if (structure.structure_kind !== 'dead-end') return;
    sections.push(current);
    current = [index + 1];
  });
  return sections;
}

function structureDraft(row: StructureRow): StructureDraft {
  return {
    row: row.row,
    name: row.name,
    kind: row.structure_kind,
    position: row.position,
    structureHeightM: row.structure_height_m,
    groundElevationM: row.ground_elevation_m,
  };
}

function withWires(sections: readonly number[][], wires: readonly WireDraft[][]): SectionDraft[] {
  return sections.map((structureIndexes, index) => ({ structureIndexes, wires: wires[index] ?? [] }));
}

interface LineRows {
  readonly name: string;
  readonly structures: readonly StructureRow[];
  readonly wires: readonly WireRow[];
}

function assembleLine(line: LineRows, conductors: ConductorLookup, issues: IssueList): LineDraft | null {
  const structures = line.structures.toSorted((one, other) => one.order - other.order);
  const errorCountBefore = issues.errorCount;
  reportTwins(line.structures, 'name', issues);
  reportTwins(line.structures, 'order', issues);
  checkEnds(structures, issues);
  checkSpanLengths(structures, issues);
  const voltageV = voltageOf(line.structures, issues);
  if (issues.errorCount > errorCountBefore) return null;
  const sections = sectionIndexes(structures);
  const wires = assignWires({ structures, sections, wires: line.wires, conductors }, issues);
  return {
    row: structures[0]?.row ?? 0,
    name: line.name,
    voltageV,
    isAssumed: false,
    structures: structures.map(structureDraft),
    sections: withWires(sections, wires),
  };
}

/** Lines of a surveyed file; lines with an error are reported and left out of the answer. */
export function surveyedLines(rows: SurveyedRows, conductors: ConductorLookup, issues: IssueList): LineDraft[] {
  const wiresByLine = groupByLine(rows.wires);
  const structuresByLine = groupByLine(rows.structures);
  for (const [name, wires] of wiresByLine) {
    const [first] = wires;
    if (structuresByLine.has(name) || rows.brokenLineNames.has(name) || first === undefined) continue;
    issues.addError({
      row: first.row,
      field: 'line_name',
      value: name,
      message: `The file has no structures of the line "${name}".`,
    });
  }
  return [...structuresByLine].flatMap(([name, structures]) => {
    if (rows.brokenLineNames.has(name)) return [];
    const line = assembleLine({ name, structures, wires: wiresByLine.get(name) ?? [] }, conductors, issues);
    return line === null ? [] : [line];
  });
}
