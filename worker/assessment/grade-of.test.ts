import { describe, expect, it } from 'vitest';
import type { SpanWireAssessment } from '#shared/engine/index.ts';
import { aBasisSpec } from '#tests/support/network.ts';
import { gradeOf, lifeThresholdYears } from './grade-of.ts';

const spec = aBasisSpec();

function aResult(utilisationRatio: number | null, more: Partial<SpanWireAssessment> = {}): SpanWireAssessment {
  const worst =
    utilisationRatio === null
      ? null
      : {
          utilisationRatio,
          stressPa: utilisationRatio * 8.5e6,
          strainRatio: 1e-4,
          limitStressPa: 8.5e6,
          limitKind: 'endurance-stress' as const,
          limitSource: 'test',
          frequencyHz: 20,
          windSpeedMPerS: 3,
          endIndex: 0 as const,
          place: 'clamp' as const,
          damperIndex: null,
          amplitudeM: 0.005,
        };
  return {
    outcome: 'steady',
    worst,
    endWorst: [null, null],
    exceedance: null,
    endAbsorbedRatioAtWorst: [0, 0],
    energyAtWorst: null,
    life: { outcome: 'no-climate' },
    methods: [],
    warnings: [],
    search: { frequencyCount: 150, worstErrorRatio: 0 },
    ...more,
  };
}

describe('gradeOf', () => {
  it.each([
    [0.79, 'calm'],
    [0.8, 'notice'],
    [0.99, 'notice'],
    [1, 'act'],
    [1.49, 'act'],
    [1.5, 'urgent'],
  ])('grades a ratio of %f as %s', (ratio, grade) => {
    expect(gradeOf(aResult(ratio), spec)).toBe(grade);
  });

  it('never calls a row without damper data calm, nor one at the amplitude limit better than act', () => {
    expect(gradeOf(aResult(0.1, { outcome: 'no-damper-data' }), spec)).toBe('notice');
    expect(gradeOf(aResult(0.1, { outcome: 'amplitude-limit' }), spec)).toBe('act');
    expect(gradeOf(aResult(null, { outcome: 'quiet' }), spec)).toBe('calm');
  });

  it('lets life govern where the basis says so and a climate is known', () => {
    const short = { life: { outcome: 'finite' as const, years: 5, damagePerYearRatio: 0.2 } };
    expect(gradeOf(aResult(0.1, short), spec)).toBe('calm');
    expect(gradeOf(aResult(0.1, short), { ...spec, governs: 'life' })).toBe('urgent');
    expect(gradeOf(aResult(1.2, { life: { outcome: 'unlimited' } }), { ...spec, governs: 'life' })).toBe('calm');
    expect(gradeOf(aResult(1.2), { ...spec, governs: 'life' })).toBe('act');
    expect(gradeOf(aResult(1.2, short), { ...spec, governs: 'worse-of-both' })).toBe('urgent');
  });
});

describe('lifeThresholdYears', () => {
  it('names the strictest threshold that a life falls below', () => {
    expect(lifeThresholdYears(5, spec)).toBe(10);
    expect(lifeThresholdYears(39, spec)).toBe(40);
    expect(lifeThresholdYears(500, spec)).toBeNull();
  });
});
