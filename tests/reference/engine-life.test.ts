import { describe, expect, it } from 'vitest';
import { lifeInputSchema, placeInputSchema } from '#shared/contract/engine.ts';
import { lifeOutputSchema, placeOutputSchema } from '#shared/contract/engine-output.ts';
import { assessSpanWire, fatigueCycles, lifeCommand, placeCommand, safeBorderLines } from '#shared/engine/index.ts';
import { aBasis, aSpanWire, endWith, referenceDamper, referenceTensionN, referenceWire } from './engine-cases.ts';

const climate = {
  sectors: Array.from({ length: 8 }, (_, index) => ({
    directionRad: (index * Math.PI) / 4,
    shareRatio: 1 / 8,
    weibullScaleMPerS: 4.5,
    weibullShapeNumber: 1.9,
  })),
};
const bare = aSpanWire({ ends: [endWith(), endWith()] });

describe('the life command', () => {
  it('gives the life of the assessment, bin by bin', () => {
    const document = lifeInputSchema.parse({ ...bare, from: 'climate', climate, fatigueCurve: 'multi-layer' });
    const output = lifeCommand(document);
    lifeOutputSchema.parse(output);
    expect(output.life).toEqual(assessSpanWire(bare, aBasis({ climate })).life);
    const sum = output.bins.reduce((total, bin) => total + bin.damagePerYearRatio, 0);
    expect(sum / output.damagePerYearRatio).toBeCloseTo(1, 12);
  });

  it('finds less damage with Rayleigh amplitudes below the steady one', () => {
    const at = (life: string) =>
      lifeCommand({ ...bare, from: 'climate', climate, fatigueCurve: 'multi-layer', methods: { life } })
        .damagePerYearRatio;
    expect(at('life-rayleigh')).toBeLessThan(at('life-steady'));
    expect(at('life-rayleigh')).toBeGreaterThan(0);
  });

  it('sums a recorder’s cells as by hand', () => {
    // 0.25 mm at T 34 696.25 N is 9.547555817 MPa by the check aeo-ps-stress-1.
    const recorder = {
      durationS: (8766 * 3600) / 50,
      cells: [{ frequencyHz: 25, bendingAmplitudePkPkM: 0.00025, cycleCount: 1e6 }],
    };
    const document = {
      from: 'recorder' as const,
      wire: referenceWire,
      tensionN: 34_696.25,
      fatigueCurve: 'multi-layer' as const,
      recorder,
    };
    const output = lifeCommand(lifeInputSchema.parse(document));
    expect(output.maxStressPa / 1e6).toBeCloseTo(9.547555817, 8);
    const damage = 50e6 / fatigueCycles(safeBorderLines['multi-layer'], 9.547555817e6);
    expect(output.damagePerYearRatio / damage).toBeCloseTo(1, 7);
    expect(output.life).toMatchObject({ outcome: 'finite' });
  });

  it('names the cell that is wrong', () => {
    const cells = [{ frequencyHz: 25, bendingAmplitudePkPkM: -1, cycleCount: 1 }];
    const recorder = { durationS: 3600, cells };
    const given = {
      from: 'recorder' as const,
      wire: referenceWire,
      tensionN: referenceTensionN,
      fatigueCurve: 'multi-layer' as const,
      recorder,
    };
    expect(() => lifeCommand(given)).toThrow('recorder.cells[0].bendingAmplitudePkPkM');
  });
});

describe('the place command', () => {
  it('answers a document by its schema', () => {
    const { wire, air } = bare;
    const document = placeInputSchema.parse({
      wire,
      air,
      span: { lengthM: 350, tensionN: referenceTensionN },
      limits: { endurance: { stressPa: 8.5e6, source: 'test' }, damperedStrain: null },
      catalogue: [{ name: 'reference', model: referenceDamper }],
      damperLimitCount: 1,
      distance: { lowerM: 0.5, upperM: 2, stepM: 0.05 },
    });
    const output = placeCommand(document);
    placeOutputSchema.parse(output);
    expect(output.choices.map((choice) => choice.damperCount)).toEqual([0, 1]);
  });
});
