import { coordinatesDeg, type Anchor } from './plane.ts';
import type { DrawnLine } from './draw-line.ts';
import { earthWire, type LinePlan } from './plan.ts';

type Cell = string | number;
export type RecordFields = Readonly<Record<string, Cell>>;

export interface StructureFields {
  readonly coordinates: readonly [number, number];
  readonly fields: RecordFields;
}

const phases = ['A', 'B', 'C'];
const newtonStep = 10;
const tensionN = (ratedStrengthN: number, ratio: number) =>
  Math.round((ratedStrengthN * ratio) / newtonStep) * newtonStep;

/** Structures of a line as the surveyed form has them. */
export function structureRecords(plan: LinePlan, drawn: DrawnLine, anchor: Anchor): StructureFields[] {
  return drawn.structures.map(({ name, order, place, kind, structureHeightM, groundElevationM }) => ({
    coordinates: coordinatesDeg(place, anchor),
    fields: {
      line_name: plan.name,
      voltage_kv: plan.voltageKV,
      name,
      order,
      structure_kind: kind,
      structure_height_m: structureHeightM,
      ground_elevation_m: groundElevationM,
    },
  }));
}

/** Wires of a line as the surveyed form has them: three phases a section, and an earth wire where the line has one. */
export function wireRecords(plan: LinePlan, drawn: DrawnLine): RecordFields[] {
  return drawn.sections.flatMap(({ fromStructure, toStructure, tensionRatio }) => {
    const ends = { line_name: plan.name, from_structure: fromStructure, to_structure: toStructure };
    const phaseWires = phases.map((name) => ({
      ...ends,
      name,
      wire_kind: 'phase',
      conductor: plan.conductor,
      conductor_standard: plan.conductorStandard,
      tension_n: tensionN(plan.ratedStrengthN, tensionRatio),
    }));
    const earth = {
      ...ends,
      name: 'E',
      wire_kind: 'earth',
      conductor: earthWire.conductor,
      conductor_standard: earthWire.conductorStandard,
      tension_n: tensionN(earthWire.ratedStrengthN, earthWire.tensionRatio),
    };
    return plan.hasEarthWire ? [...phaseWires, earth] : phaseWires;
  });
}
