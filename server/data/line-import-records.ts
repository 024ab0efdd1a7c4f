/** Lines ready to be stored, with their ids; every number has been checked. */
export interface StructureRecord {
  readonly id: string;
  readonly name: string;
  readonly kind: 'dead-end' | 'suspension';
  readonly structureHeightM: number;
  readonly groundElevationM: number;
  readonly longitudeDeg: number;
  readonly latitudeDeg: number;
}

export interface SpanRecord {
  readonly id: string;
  readonly orderIndex: number;
  readonly fromStructureId: string;
  readonly toStructureId: string;
  readonly spanLengthM: number;
  readonly bearingDeg: number;
  readonly meanWireHeightM: number;
}

export interface WireRecord {
  readonly id: string;
  readonly name: string;
  readonly kind: 'phase' | 'earth';
  readonly conductorTypeId: string;
  readonly tensionN: number;
}

export interface SectionRecord {
  readonly id: string;
  readonly name: string;
  readonly orderIndex: number;
  readonly rulingSpanM: number;
  readonly sectionLengthM: number;
  readonly spans: readonly SpanRecord[];
  readonly wires: readonly WireRecord[];
}

export interface LineRecord {
  readonly id: string;
  readonly name: string;
  readonly voltageV: number | null;
  /** True for everything of a line that was made from a centre line and assumptions. */
  readonly isAssumed: boolean;
  readonly structures: readonly StructureRecord[];
  readonly sections: readonly SectionRecord[];
}

export interface ImportCounts {
  readonly lineCount: number;
  readonly sectionCount: number;
  readonly structureCount: number;
  readonly spanCount: number;
  readonly wireCount: number;
  readonly spanWireCount: number;
}

/** How many rows of each kind the lines are. */
export function countLines(lines: readonly LineRecord[]): ImportCounts {
  const sections = lines.flatMap((line) => line.sections);
  const sum = (count: (section: SectionRecord) => number) =>
    sections.reduce((total, section) => total + count(section), 0);
  return {
    lineCount: lines.length,
    sectionCount: sections.length,
    structureCount: lines.reduce((total, line) => total + line.structures.length, 0),
    spanCount: sum(({ spans }) => spans.length),
    wireCount: sum(({ wires }) => wires.length),
    spanWireCount: sum(({ spans, wires }) => spans.length * wires.length),
  };
}
