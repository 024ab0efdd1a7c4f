import { randomUUID } from 'node:crypto';
import type { LineRecord, SectionRecord, SpanRecord, StructureRecord } from '#server/data/line-import-records.ts';
import { geodesicPath, middleBearingDeg } from './geodesic-path.ts';
import type { IssueList } from './issue-list.ts';
import type { LineDraft, SectionDraft, StructureDraft } from './line-draft.ts';
import { meanWireHeight } from './mean-wire-height.ts';

/**
 * Ruling span of a section: the level span whose tension changes with temperature as the section's does.
 *
 * @source closed form: sqrt(ΣL³/ΣL)
 */
export function rulingSpanM(spanLengthsM: readonly number[]): number {
  const lengthM = spanLengthsM.reduce((sum, spanLengthM) => sum + spanLengthM, 0);
  const cubes = spanLengthsM.reduce((sum, spanLengthM) => sum + spanLengthM ** 3, 0);
  return Math.sqrt(cubes / lengthM);
}

interface PlacedStructure {
  readonly draft: StructureDraft;
  readonly record: StructureRecord;
}

function placeStructure(draft: StructureDraft): PlacedStructure {
  const { name, kind, structureHeightM, groundElevationM, position } = draft;
  return { draft, record: { id: randomUUID(), name, kind, structureHeightM, groundElevationM, ...position } };
}

function completeSpan(
  ends: readonly [PlacedStructure, PlacedStructure],
  section: SectionDraft,
  issues: IssueList,
): Omit<SpanRecord, 'orderIndex'> {
  const [from, to] = ends;
  const path = geodesicPath(from.draft.position, to.draft.position);
  const { heightM, isOverValley } = meanWireHeight({
    spanLengthM: path.lengthM,
    fromHeightM: from.draft.structureHeightM,
    toHeightM: to.draft.structureHeightM,
    wires: section.wires,
  });
  if (isOverValley) {
    const message = `Between "${from.draft.name}" and "${to.draft.name}" the wires hang too low for flat ground (${path.lengthM.toFixed(0)} m); a valley is taken, with the mean attachment height of ${heightM.toFixed(1)} m.`;
    issues.addNotice({ row: to.draft.row, field: 'structure_height_m', message });
  }
  return {
    id: randomUUID(),
    fromStructureId: from.record.id,
    toStructureId: to.record.id,
    spanLengthM: path.lengthM,
    bearingDeg: middleBearingDeg(path),
    meanWireHeightM: heightM,
  };
}

function completeSection(
  section: SectionDraft,
  structures: readonly PlacedStructure[],
  issues: IssueList,
): Omit<SectionRecord, 'orderIndex'> | null {
  const placed = section.structureIndexes.flatMap((index) => structures[index] ?? []);
  const spans = placed.slice(1).flatMap((to, orderIndex) => {
    const from = placed[orderIndex];
    return from === undefined ? [] : [{ ...completeSpan([from, to], section, issues), orderIndex }];
  });
  const [first] = placed;
  const last = placed[placed.length - 1];
  if (first === undefined || last === undefined || spans.length === 0) return null;
  const spanLengthsM = spans.map(({ spanLengthM }) => spanLengthM);
  return {
    id: randomUUID(),
    name: `${first.record.name}–${last.record.name}`,
    rulingSpanM: rulingSpanM(spanLengthsM),
    sectionLengthM: spanLengthsM.reduce((sum, spanLengthM) => sum + spanLengthM, 0),
    spans,
    wires: section.wires.map(({ name, kind, conductorTypeId, tensionN }) => ({
      id: randomUUID(),
      name,
      kind,
      conductorTypeId,
      tensionN,
    })),
  };
}

/** Gives a checked line its ids, span lengths, bearings, heights and ruling spans. */
export function completeLine(line: LineDraft, issues: IssueList): LineRecord {
  const structures = line.structures.map(placeStructure);
  const sections = line.sections.flatMap((section, orderIndex) => {
    const completed = completeSection(section, structures, issues);
    return completed === null ? [] : [{ ...completed, orderIndex }];
  });
  return {
    id: randomUUID(),
    name: line.name,
    voltageV: line.voltageV,
    isAssumed: line.isAssumed,
    structures: structures.map(({ record }) => record),
    sections,
  };
}
