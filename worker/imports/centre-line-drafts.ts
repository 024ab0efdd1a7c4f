import type { CentreLine } from './read-centre-lines.ts';
import { assumedClasses, classOfVoltage, type AssumedClass, type Assumptions } from './assumed-classes.ts';
import type { ConductorLookup } from './conductor-lookup.ts';
import { divideStretch, type DividedPoint } from './divide-stretch.ts';
import type { IssueList } from './issue-list.ts';
import type { Stretch } from './join-stretches.ts';
import type { LineDraft, SectionDraft, StructureDraft } from './line-draft.ts';
import { prepareStretches } from './prepare-stretches.ts';

/** So many spans are made at most from one file; more is a slip in the typical span length. */
export const largestSpanCount = 250_000;
const voltPerKilovolt = 1000;

interface LineBuilder {
  readonly line: CentreLine;
  readonly assumed: AssumedClass;
  readonly structures: StructureDraft[];
  readonly sections: SectionDraft[];
  /** Structure that stands at a node where stretches meet: they share it. */
  readonly structureAtNode: Map<number, number>;
}

function addStructure(builder: LineBuilder, { position, isDeadEnd }: DividedPoint): number {
  builder.structures.push({
    row: builder.line.row,
    name: String(builder.structures.length + 1),
    kind: isDeadEnd ? 'dead-end' : 'suspension',
    position,
    structureHeightM: builder.assumed.structureHeightM,
    groundElevationM: 0,
  });
  return builder.structures.length - 1;
}

function structureIndexesOf(builder: LineBuilder, stretch: Stretch, points: readonly DividedPoint[]): number[] {
  return points.map((point, index) => {
    const node = index === 0 ? stretch.startNodeIndex : index === points.length - 1 ? stretch.endNodeIndex : null;
    if (node === null) return addStructure(builder, point);
    const standing = builder.structureAtNode.get(node);
    if (standing !== undefined) return standing;
    const added = addStructure(builder, point);
    builder.structureAtNode.set(node, added);
    return added;
  });
}

function addSections(builder: LineBuilder, points: readonly DividedPoint[], indexes: readonly number[]): void {
  const wires = builder.assumed.wires.map((wire) => ({ ...wire, row: builder.line.row }));
  let current: number[] = [];
  indexes.forEach((structureIndex, place) => {
    current.push(structureIndex);
    if (place === 0 || points[place]?.isDeadEnd !== true) return;
    builder.sections.push({ structureIndexes: current, wires });
    current = [structureIndex];
  });
}

function buildLine(line: CentreLine, context: { assumptions: Assumptions; assumed: AssumedClass }, issues: IssueList) {
  const { assumptions, assumed } = context;
  const builder: LineBuilder = { line, assumed, structures: [], sections: [], structureAtNode: new Map() };
  const { stretches, leftOutCount } = prepareStretches(line, assumptions.minimumStretchLengthM, issues);
  for (const stretch of stretches) {
    const points = divideStretch(stretch.points, assumptions);
    addSections(builder, points, structureIndexesOf(builder, stretch, points));
  }
  const { structures, sections } = builder;
  const draft: LineDraft = {
    row: line.row,
    name: line.name,
    voltageV: line.voltageV,
    isAssumed: true,
    structures,
    sections,
  };
  return { draft: sections.length === 0 ? null : draft, leftOutCount };
}

/** Lines made from centre lines by the chosen assumptions; everything in them is assumed. */
export function centreLineDrafts(
  lines: readonly CentreLine[],
  context: { assumptions: Assumptions; conductors: ConductorLookup },
  issues: IssueList,
) {
  const classes = assumedClasses(context.assumptions, context.conductors, issues);
  const drafts: LineDraft[] = [];
  let leftOutCount = 0;
  let spanCount = 0;
  if (classes.length < context.assumptions.voltageClasses.length) return { drafts, leftOutCount };
  for (const line of lines) {
    const assumed = classOfVoltage(classes, line.voltageV);
    if (assumed === undefined) {
      const message = `No voltage class of the assumptions reaches up to ${line.voltageV / voltPerKilovolt} kV.`;
      issues.addError({ row: line.row, field: 'assumptions.voltageClasses', value: line.name, message });
      continue;
    }
    const built = buildLine(line, { assumptions: context.assumptions, assumed }, issues);
    leftOutCount += built.leftOutCount;
    if (built.draft !== null) drafts.push(built.draft);
    spanCount += built.draft?.structures.length ?? 0;
    if (spanCount <= largestSpanCount) continue;
    const message = `The file would become more than ${largestSpanCount} spans; choose a longer typical span or split the file.`;
    issues.addError({
      row: null,
      field: 'assumptions.typicalSpanLengthM',
      value: context.assumptions.typicalSpanLengthM,
      message,
    });
    return { drafts: [], leftOutCount };
  }
  return { drafts, leftOutCount };
}
