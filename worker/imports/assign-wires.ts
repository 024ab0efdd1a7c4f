import type { ConductorLookup } from './conductor-lookup.ts';
import type { IssueList } from './issue-list.ts';
import type { WireDraft } from './line-draft.ts';
import type { StructureRow, WireRow } from './read-surveyed-rows.ts';

interface WireAssignment {
  /** In the order of the line. */
  readonly structures: readonly StructureRow[];
  readonly sections: readonly (readonly number[])[];
  readonly wires: readonly WireRow[];
  readonly conductors: ConductorLookup;
}

/** Index of the dead-end that a wire names, or null with an error. */
function deadEndIndex(
  wire: WireRow,
  field: 'from_structure' | 'to_structure',
  context: { readonly structures: readonly StructureRow[]; readonly issues: IssueList },
): number | null {
  const name = wire[field];
  const index = context.structures.findIndex((structure) => structure.name === name);
  const structure = context.structures[index];
  const report = (message: string) => {
    context.issues.addError({ row: wire.row, field, value: name, message });
    return null;
  };
  if (structure === undefined) return report(`The line "${wire.line_name}" has no structure "${name}".`);
  if (structure.structure_kind === 'dead-end') return index;
  return report(
    `A wire is strung between dead-ends; structure "${name}" (row ${structure.row}) is a suspension structure.`,
  );
}

function wireDraft(wire: WireRow, conductors: ConductorLookup, issues: IssueList): WireDraft | null {
  const choice = conductors.choose(wire.conductor, wire.conductor_standard);
  if (choice.outcome === 'unknown') {
    issues.addError({ row: wire.row, field: 'conductor', value: wire.conductor, message: choice.message });
    return null;
  }
  const { conductor } = choice;
  if (wire.tension_n >= conductor.ratedStrengthN) {
    issues.addError({
      row: wire.row,
      field: 'tension_n',
      value: wire.tension_n,
      message: `The tension reaches the rated strength of ${conductor.name}; allowed: 100 N to below ${conductor.ratedStrengthN} N.`,
    });
    return null;
  }
  return {
    row: wire.row,
    name: wire.name,
    kind: wire.wire_kind,
    conductorTypeId: conductor.id,
    massKgPerM: conductor.massKgPerM,
    tensionN: wire.tension_n,
  };
}

function addToSection(draft: WireDraft, section: WireDraft[], issues: IssueList): void {
  const twin = section.find(({ name }) => name === draft.name);
  if (twin === undefined) section.push(draft);
  else {
    const message = `A wire of this name is strung in the same section already, in row ${twin.row}.`;
    issues.addError({ row: draft.row, field: 'name', value: draft.name, message });
  }
}

/** Wires of each section. A wire that passes dead-ends on its way is one wire in each of the sections it covers. */
export function assignWires(assignment: WireAssignment, issues: IssueList): WireDraft[][] {
  const { structures, sections, conductors } = assignment;
  const strung: WireDraft[][] = sections.map(() => []);
  for (const wire of assignment.wires) {
    const ends = [
      deadEndIndex(wire, 'from_structure', { structures, issues }),
      deadEndIndex(wire, 'to_structure', { structures, issues }),
    ];
    const draft = wireDraft(wire, conductors, issues);
    const [from = null, to = null] = ends;
    if (from === null || to === null || draft === null) continue;
    if (from === to) {
      issues.addError({
        row: wire.row,
        field: 'to_structure',
        value: wire.to_structure,
        message: 'A wire must end at another structure than it starts from.',
      });
      continue;
    }
    const [first, last] = [Math.min(from, to), Math.max(from, to)];
    sections.forEach((indexes, index) => {
      const start = indexes[0] ?? 0;
      const section = strung[index];
      if (start >= first && start < last && section !== undefined) addToSection(draft, section, issues);
    });
  }
  strung.forEach((wires, index) => {
    const start = structures[sections[index]?.[0] ?? 0];
    if (wires.length > 0 || start === undefined) return;
    const message = `No wire is strung in the section that starts at structure "${start.name}" of line "${start.line_name}"; it has nothing to assess.`;
    issues.addNotice({ row: start.row, field: 'wire', message });
  });
  return strung;
}
