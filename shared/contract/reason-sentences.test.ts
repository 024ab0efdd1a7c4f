import { describe, expect, it } from 'vitest';
import { reasonSentence } from './reason-sentences.ts';
import { reasonSchema, type Reason } from './reasons.ts';

const stress: Reason = {
  code: 'stress-against-limit',
  structureName: '14',
  place: 'clamp',
  stressPa: 31e6,
  limitPa: 22e6,
  limitSource: 'line owner',
  frequencyHz: 28,
  windSpeedMPerS: 4.2,
  isOver: true,
};

const reasons: Reason[] = [
  stress,
  {
    code: 'strain-against-limit',
    structureName: '14',
    place: 'damper-clamp',
    strainRatio: 150e-6,
    limitRatio: 75e-6,
    limitSource: 'line owner',
    frequencyHz: 28,
    windSpeedMPerS: 4.2,
    isOver: true,
  },
  { code: 'band-over-limit', windLowerMPerS: 2, windUpperMPerS: 5, frequencyLowerHz: 13, frequencyUpperHz: 33 },
  { code: 'life', lifeYears: 12, thresholdYears: 40 },
  { code: 'life', lifeYears: 12, thresholdYears: null },
  { code: 'no-damper', structureName: '14', tensionRatedRatio: 0.21, hOverWM: 2000 },
  { code: 'weak-absorption', structureName: '14', absorbedRatio: 0.08, frequencyHz: 40, dampersCount: 2 },
  { code: 'damper-off-plan', structureName: '14', distanceM: 1.4, plannedDistanceM: 1.05, offsetM: 0.35 },
  { code: 'amplitude-limit', frequencyHz: 10, windSpeedMPerS: 1.5 },
  { code: 'no-damper-data', frequencyLowerHz: 5, frequencyUpperHz: 60 },
  { code: 'refused-input', field: 'span.tensionN', problem: 'must not exceed the rated strength' },
  { code: 'quiet' },
  { code: 'assumed-input' },
];

describe('reasonSentence', () => {
  it('says what, how much, where and against what', () => {
    expect(reasonSentence(stress, 'metric').replaceAll('\u2009', ' ')).toBe(
      'Bending stress at the clamp of structure 14 reaches 31.0 MPa at 28.0 Hz (wind 4.20 m/s); limit 22.0 MPa (line owner).',
    );
  });

  it('speaks the units of the reader', () => {
    const sentence = reasonSentence(stress, 'us').replaceAll('\u2009', ' ');
    expect(sentence).toContain('4.50 ksi');
    expect(sentence).toContain('9.40 mph');
  });

  it('has a sentence for every code', () => {
    expect(new Set(reasons.map(({ code }) => code))).toEqual(
      new Set(reasonSchema.options.map((option) => option.shape.code.value)),
    );
    for (const reason of reasons) {
      const sentence = reasonSentence(reason, 'metric');
      expect(sentence).toMatch(/^[A-Z].*\.$/);
      expect(sentence).not.toMatch(/NaN|undefined|null|–/);
    }
  });

  it('says nothing of a threshold that is not set', () => {
    expect(reasonSentence({ code: 'life', lifeYears: 12, thresholdYears: null }, 'metric')).not.toContain('threshold');
  });
});
