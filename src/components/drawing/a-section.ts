import type { Section } from '#shared/contract/sections.ts';

/** A uuid of the given number, for tests. */
export function anId(number: number): string {
  return `0198d3c2-7a50-7000-8000-${String(number).padStart(12, '0')}`;
}

const structure = (number: number, chainageM: number): Section['structures'][number] => ({
  id: anId(10 + number),
  name: String(number),
  kind: number === 2 ? 'suspension' : 'dead-end',
  positionDeg: [-31.2, 38.4],
  groundElevationM: 100,
  structureHeightM: 24,
  chainageM,
  isAssumed: false,
});
const span = (number: number, spanLengthM: number): Section['spans'][number] => ({
  id: anId(20 + number),
  label: `${number}–${number + 1}`,
  fromStructureId: anId(10 + number),
  toStructureId: anId(11 + number),
  orderIndex: number - 1,
  spanLengthM,
  bearingDeg: 90,
  roughnessM: 0.05,
  turbulenceIntensityRatio: 0.16,
  terrainZoneName: null,
  isAssumed: false,
});
const wire = (number: number, name: string): Section['wires'][number] => ({
  id: anId(30 + number),
  name,
  kind: 'phase',
  conductorTypeId: anId(90),
  conductorName: 'Drake',
  conductorDiameterM: 0.02814,
  conductorMassKgPerM: 1.628,
  ratedStrengthN: 140_119,
  tensionN: 27_757,
  isAssumed: false,
  versionNumber: 3,
});
const spanWire = (number: number): Section['spanWires'][number] => ({
  id: anId(40 + number),
  spanId: anId(20 + (number <= 2 ? 1 : 2)),
  wireId: anId(30 + (number % 2 === 1 ? 1 : 2)),
  grade: number === 1 ? 'urgent' : number === 2 ? null : 'calm',
  isStale: number === 3,
  staleReason: number === 3 ? 'tension changed' : null,
  findingId: number === 2 ? null : anId(50 + number),
  utilisationRatio: number === 1 ? 1.6 : null,
});

/** Test builder: a section of three structures, two spans, two wires; span wire 1 Urgent, span wire 2 not assessed. */
export function aSection(overrides: Partial<Section> = {}): Section {
  return {
    id: anId(1),
    name: '1–3',
    lineId: anId(2),
    lineName: 'Harbour A',
    rulingSpanM: 351,
    lengthM: 700,
    grade: 'urgent',
    isStale: true,
    isAssumed: false,
    assessedAt: '2026-11-30T10:00:00Z',
    structures: [structure(1, 0), structure(2, 350), structure(3, 700)],
    spans: [span(1, 350), span(2, 350)],
    wires: [wire(1, 'A'), wire(2, 'B')],
    spanWires: [spanWire(1), spanWire(2), spanWire(3), spanWire(4)],
    placements: [],
    ...overrides,
  };
}

/** Test builder: a damper planned at the first end of span 1, wire A. */
export function aPlacement(overrides: Partial<Section['placements'][number]> = {}): Section['placements'][number] {
  return {
    id: anId(60),
    spanWireId: anId(41),
    spanId: anId(21),
    wireId: anId(31),
    side: 'from',
    damperTypeId: anId(70),
    damperTypeName: 'Tern 2',
    distanceM: 1.05,
    plannedDistanceM: null,
    state: 'planned',
    startedAt: '2026-11-01T08:00:00Z',
    endedAt: null,
    loggedByName: null,
    photoFileId: null,
    note: '',
    versionNumber: 1,
    ...overrides,
  };
}
