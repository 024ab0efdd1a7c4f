import type { Position } from './geodesic-path.ts';

/** Lines as a file describes them, checked row by row, before lengths and ids: what both kinds of file end in. */
export interface StructureDraft {
  readonly row: number;
  readonly name: string;
  readonly kind: 'dead-end' | 'suspension';
  readonly position: Position;
  readonly structureHeightM: number;
  readonly groundElevationM: number;
}

export interface WireDraft {
  readonly row: number;
  readonly name: string;
  readonly kind: 'phase' | 'earth';
  readonly conductorTypeId: string;
  readonly massKgPerM: number;
  readonly tensionN: number;
}

/** Dead-end to dead-end: indexes of its structures in the line, in order, and the wires strung between its ends. */
export interface SectionDraft {
  readonly structureIndexes: readonly number[];
  readonly wires: readonly WireDraft[];
}

export interface LineDraft {
  readonly row: number;
  readonly name: string;
  readonly voltageV: number | null;
  readonly isAssumed: boolean;
  readonly structures: readonly StructureDraft[];
  readonly sections: readonly SectionDraft[];
}
