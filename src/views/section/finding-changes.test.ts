import { describe, expect, it } from 'vitest';
import type { FindingSummary } from '#shared/contract/findings.ts';
import { anId } from '#src/components/drawing/a-section.ts';
import { findingChanges } from './finding-changes.ts';

function aSummary(overrides: Partial<FindingSummary>): FindingSummary {
  return {
    id: anId(51),
    assessmentId: anId(80),
    spanWireId: anId(41),
    outcome: 'steady',
    grade: 'act',
    utilisationRatio: 1.2,
    stressPa: 26e6,
    limitStressPa: 22e6,
    frequencyHz: 28,
    windSpeedMPerS: 4.2,
    amplitudeM: 0.003,
    lifeYears: null,
    reasons: [],
    assessedAt: '2026-11-30T10:00:00Z',
    ...overrides,
  };
}

describe('findingChanges', () => {
  it('compares each finding with the one before it', () => {
    const changes = findingChanges(
      [
        aSummary({ grade: 'notice', stressPa: 18e6 }),
        aSummary({ grade: 'urgent', stressPa: 31e6 }),
        aSummary({ grade: 'act', stressPa: null }),
      ],
      false,
    );
    expect(changes).toEqual([
      { grade: 'better', formerGrade: 'urgent', stressPa: -13e6 },
      { grade: 'worse', formerGrade: 'act', stressPa: null },
      { grade: 'first', formerGrade: null, stressPa: null },
    ]);
  });

  it('says when nothing changed', () => {
    expect(findingChanges([aSummary({}), aSummary({})], false)[0]).toMatchObject({ grade: 'same', stressPa: 0 });
  });

  it('does not call the last one the first while older ones are not fetched', () => {
    expect(findingChanges([aSummary({})], true)[0]?.grade).toBe('unknown');
  });
});
