import type { SpanListItem } from '#shared/contract/lines.ts';
import { anId } from '#src/components/drawing/a-section.ts';

/** Test builder: a Calm span of 350 m with four span wires. */
export function aSpanItem(overrides: Partial<SpanListItem> = {}): SpanListItem {
  return {
    id: anId(21),
    label: '14–15',
    sectionId: anId(1),
    sectionName: '14–18',
    lineId: anId(2),
    lineName: 'Harbour A',
    spanLengthM: 350,
    spanWireCount: 4,
    grade: 'calm',
    isStale: false,
    isAssumed: false,
    centreDeg: [-21, -38.5],
    ...overrides,
  };
}
