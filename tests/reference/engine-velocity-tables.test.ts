import { describe, expect, it } from 'vitest';
import { spanInputSchema } from '#shared/contract/engine.ts';
import { assessSpanWire, endCommand, spanCommand, type DamperModel } from '#shared/engine/index.ts';
import { aBasis, aSpanWire, endWith, referenceTensionN, referenceWire } from './engine-cases.ts';

const rows = (realNsPerM: number, imaginaryNsPerM: number) =>
  [5, 60].map((frequencyHz) => ({ frequencyHz, realNsPerM, imaginaryNsPerM }));
const slow = { clampVelocityMPerS: 0.001, rows: rows(260, 120) };
const fast = { clampVelocityMPerS: 0.5, rows: rows(90, -40) };
const tables: DamperModel = { kind: 'velocity-tables', tables: [slow, fast] };

const spanOf = (model: DamperModel, frequenciesHz: number[]) => ({
  wire: referenceWire,
  span: { lengthM: 350, tensionN: referenceTensionN },
  air: { densityKgPerM3: 1.225, turbulenceIntensityRatio: 0.11 },
  ends: [{ dampers: [{ distanceM: 1, model }] }, endWith()] as [ReturnType<typeof endWith>, ReturnType<typeof endWith>],
  frequenciesHz,
});

describe('impedance tables at several clamp velocities', () => {
  it.each([9, 18, 27, 40])('settle where velocity and impedance agree, at %d Hz', (frequencyHz) => {
    const row = spanCommand(spanOf(tables, [frequencyHz])).rows[0];
    const amplitudeM = row?.endAmplitudeM[0] ?? NaN;
    // By hand: the velocity that this amplitude gives, and a plain table of the impedance at that velocity.
    let velocity = 0.02;
    let model: DamperModel = tables;
    for (let step = 0; step < 200; step += 1) {
      const share = Math.min(Math.max(Math.log(velocity / 0.001) / Math.log(0.5 / 0.001), 0), 1);
      model = { kind: 'table', rows: rows(260 - share * 170, 120 - share * 160) };
      const wire = { massKgPerM: referenceWire.massKgPerM, bendingStiffnessMinNm2: 44.06 };
      const end = { dampers: [{ distanceM: 1, model }] };
      const motion = endCommand({ wire, tensionN: referenceTensionN, end, frequenciesHz: [frequencyHz] }).rows[0]
        ?.damperMotionRatio[0];
      velocity = Math.sqrt(velocity * 2 * Math.PI * frequencyHz * amplitudeM * (motion ?? NaN));
    }
    const expected = spanCommand(spanOf(model, [frequencyHz])).rows[0];
    expect(amplitudeM / (expected?.endAmplitudeM[0] ?? NaN)).toBeCloseTo(1, 5);
    expect((row?.endReflectionRatio[0] ?? NaN) / (expected?.endReflectionRatio[0] ?? NaN)).toBeCloseTo(1, 5);
  });

  it('are a plain table where all are the same', () => {
    const same: DamperModel = { kind: 'velocity-tables', tables: [slow, { ...fast, rows: slow.rows }] };
    const plain: DamperModel = { kind: 'table', rows: slow.rows };
    expect(spanCommand(spanOf(same, [10, 25])).rows).toEqual(spanCommand(spanOf(plain, [10, 25])).rows);
  });

  it('go through the assessment and name the method', () => {
    const input = aSpanWire({ ends: [{ dampers: [{ distanceM: 1, model: tables }] }, endWith()] });
    const result = assessSpanWire(input, aBasis());
    expect(result.methods.map((method) => method.name)).toContain('damper-velocity-tables');
    expect(result.warnings.map((warning) => warning.code)).not.toContain('velocity-not-settled');
  });

  it('are refused out of order, by table and row', () => {
    const turned: DamperModel = { kind: 'velocity-tables', tables: [fast, slow] };
    expect(() => spanCommand(spanOf(turned, [25]))).toThrow('ends[0].dampers[0].model.tables[1].clampVelocityMPerS');
    const giving = { ...fast, rows: rows(-5, 0) };
    const bad: DamperModel = { kind: 'velocity-tables', tables: [slow, giving] };
    expect(() => spanCommand(spanOf(bad, [25]))).toThrow('ends[0].dampers[0].model.tables[1].rows[0]');
    expect(spanInputSchema.safeParse(spanOf(bad, [25])).success).toBe(false);
    expect(spanInputSchema.safeParse(spanOf(tables, [25])).success).toBe(true);
  });
});
