import type { RiskRow } from '#shared/contract/risk.ts';
import { anId } from '#src/components/drawing/a-section.ts';

/** Test builder: an Urgent span wire over its stress limit. */
export function aRiskRow(overrides: Partial<RiskRow> = {}): RiskRow {
  return {
    spanWireId: anId(41),
    spanId: anId(21),
    sectionId: anId(1),
    findingId: anId(51),
    lineName: 'Harbour A',
    sectionName: '14–18',
    spanLabel: '14–15',
    wireName: 'A',
    conductorName: 'Drake',
    spanLengthM: 350,
    tensionN: 27_757,
    ratedStrengthN: 140_119,
    grade: 'urgent',
    outcome: 'steady',
    utilisationRatio: 1.41,
    stressPa: 31e6,
    limitStressPa: 22e6,
    frequencyHz: 28,
    windSpeedMPerS: 4.2,
    lifeYears: null,
    leadingReason: {
      code: 'stress-against-limit',
      structureName: '14',
      place: 'clamp',
      stressPa: 31e6,
      limitPa: 22e6,
      limitSource: 'invented for a test',
      frequencyHz: 28,
      windSpeedMPerS: 4.2,
      isOver: true,
    },
    damperCount: 0,
    isStale: false,
    isAssumed: false,
    assessedAt: '2026-11-30T10:00:00Z',
    ...overrides,
  };
}
