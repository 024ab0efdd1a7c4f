import { describe, expect, it } from 'vitest';
import { assessSpanWire, endCommand, type SpanEnd } from '#shared/engine/index.ts';
import { aBasis, aSpanWire, endWith, referenceTensionN, referenceWire } from './engine-cases.ts';

const bare = { lengthM: 0.9, massKgPerM: referenceWire.massKgPerM, bendingStiffnessNm2: 44.06 };
const rods = { lengthM: 0.9, massKgPerM: 4.1, bendingStiffnessNm2: 900 };
const firm = { massKg: 0, stiffnessNPerM: 1e9, dampingNsPerM: 0 };

const rowsOf = (end: SpanEnd, frequenciesHz = [8, 17, 30, 44]) =>
  endCommand({ wire: referenceWire, tensionN: referenceTensionN, end, frequenciesHz }).rows;
const sizes = (end: SpanEnd) =>
  rowsOf(end).map(({ reflection }) => Math.hypot(reflection?.re ?? NaN, reflection?.im ?? NaN));

describe('the general end solver', () => {
  it.each([[[1]], [[0.5, 1.6]], [[0.4, 0.9, 2]], [[]]])(
    'gives what the fast one gives where nothing changes: dampers %j',
    (distances) => {
      const plain = endWith(...distances);
      const fast = rowsOf(plain);
      rowsOf({ ...plain, armourRods: bare }).forEach((row, index) => {
        const other = fast[index];
        expect(row.reflection?.re).toBeCloseTo(other?.reflection?.re ?? NaN, 9);
        expect(row.reflection?.im).toBeCloseTo(other?.reflection?.im ?? NaN, 9);
        expect((row.clampCurvaturePerM2 ?? NaN) / (other?.clampCurvaturePerM2 ?? NaN)).toBeCloseTo(1, 8);
        row.damperCurvaturePerM2.forEach((curvature, damper) => {
          expect((curvature ?? NaN) / (other?.damperCurvaturePerM2[damper] ?? NaN)).toBeCloseTo(1, 8);
          expect((row.damperMotionRatio[damper] ?? NaN) / (other?.damperMotionRatio[damper] ?? NaN)).toBeCloseTo(1, 8);
        });
      });
    },
  );

  it('tends to the rigid clamp as the support grows stiff', () => {
    const rigid = rowsOf(endWith(1));
    rowsOf({ ...endWith(1), support: firm }).forEach((row, index) => {
      // A support of 1e9 N/m gives way by about Z₀ω/1e9 < 1e-4 of the wire's motion.
      expect((row.clampCurvaturePerM2 ?? NaN) / (rigid[index]?.clampCurvaturePerM2 ?? NaN)).toBeCloseTo(1, 3);
    });
  });

  it('reflects everything at rods and at a moving clamp without loss', () => {
    const lossless = { massKg: 12, stiffnessNPerM: 4e4, dampingNsPerM: 0 };
    sizes({ dampers: [], armourRods: rods }).forEach((size) => expect(size).toBeCloseTo(1, 9));
    sizes({ dampers: [], armourRods: rods, support: lossless }).forEach((size) => expect(size).toBeCloseTo(1, 9));
  });

  it('loses what a clamp with damping takes, and never more', () => {
    const lossy = { massKg: 1, stiffnessNPerM: 1e3, dampingNsPerM: 80 };
    sizes({ dampers: [], support: lossy }).forEach((size) => {
      expect(size).toBeLessThan(0.999);
      expect(size).toBeGreaterThanOrEqual(0);
    });
  });

  it('matches the string where a massless moving clamp ends it: R = (Z₀ − Z)/(Z₀ + Z)', () => {
    const dampingNsPerM = 100;
    const end: SpanEnd = { dampers: [], support: { massKg: 0, stiffnessNPerM: 0, dampingNsPerM } };
    const wire = { ...referenceWire, bendingStiffnessMinNm2: 1e-4 };
    const row = endCommand({ wire, tensionN: referenceTensionN, end, frequenciesHz: [20] }).rows[0];
    const Z0 = Math.sqrt(referenceTensionN * referenceWire.massKgPerM);
    // The stiff end turns with the wire within √(EI/T) = 0.06 mm of the clamp.
    expect(Math.hypot(row?.reflection?.re ?? NaN, row?.reflection?.im ?? NaN)).toBeCloseTo(
      (Z0 - dampingNsPerM) / (Z0 + dampingNsPerM),
      3,
    );
  });

  it('bends the wire less at the clamp under rods', () => {
    const [plain, covered] = [rowsOf(endWith(), [25])[0], rowsOf({ dampers: [], armourRods: rods }, [25])[0]];
    expect(covered?.clampCurvaturePerM2).toBeLessThan(0.5 * (plain?.clampCurvaturePerM2 ?? NaN));
  });

  it('goes through the whole assessment and names its method', () => {
    const input = aSpanWire({ ends: [{ ...endWith(1.3), armourRods: rods }, endWith()] });
    const result = assessSpanWire(input, aBasis());
    expect(result.energyAtWorst?.closureRatio).toBeLessThanOrEqual(1e-8);
    expect(result.methods.map((method) => method.name)).toContain('end-armour-rods');
  });
});
