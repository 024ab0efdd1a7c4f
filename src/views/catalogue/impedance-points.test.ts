import { describe, expect, it } from 'vitest';
import { impedancePoints } from './impedance-points.ts';

describe('impedancePoints', () => {
  it('takes the rows of a table as they are, in either form', () => {
    const points = impedancePoints({
      kind: 'table',
      rows: [
        { frequencyHz: 10, realNsPerM: 30, imaginaryNsPerM: -40 },
        { frequencyHz: 20, magnitudeNsPerM: 80, phaseRad: 0.4 },
      ],
    });
    expect(points).toEqual([
      { frequencyHz: 10, magnitudeNsPerM: 50 },
      { frequencyHz: 20, magnitudeNsPerM: 80 },
    ]);
  });

  it('has a peak near each resonance of a damper known by its parts', () => {
    // Resonances of this damper, computed independently: 5.31, 9.48, 46.4 and 89.6 Hz.
    const points = impedancePoints({
      kind: 'halves',
      clampMassKg: 0.4,
      halves: [
        { massKg: 1.5, inertiaKgM2: 0.004, armLengthM: 0.2, armStiffnessNm2: 30, offsetM: 0.05, lossRatio: 0.3 },
        { massKg: 2.5, inertiaKgM2: 0.01, armLengthM: 0.26, armStiffnessNm2: 30, offsetM: 0.05, lossRatio: 0.3 },
      ],
    });
    const at10 = points.reduce((best, point) =>
      Math.abs(point.frequencyHz - 10) < Math.abs(best.frequencyHz - 10) ? point : best,
    );
    // |303.9529 − 25.7233j| N·s/m at 10 Hz; the drawn point is the one of the 0.25 Hz grid there.
    expect(at10.frequencyHz).toBeCloseTo(10, 9);
    expect(at10.magnitudeNsPerM).toBeCloseTo(Math.hypot(303.9529, 25.7233), 2);
  });
});
