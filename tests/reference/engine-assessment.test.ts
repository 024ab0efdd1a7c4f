import { describe, expect, it } from 'vitest';
import {
  assessSpanWire,
  createEndResponseCache,
  EngineInputError,
  fatigueCycles,
  hoursPerYearCount,
  safeBorderLines,
  spanWireProfile,
  spanWireSeries,
  weibullShare,
  type DamperModel,
  type VibrationBasis,
} from '#shared/engine/index.ts';
import { aBasis, aSpanWire, endWith, referenceDamper, referenceTensionN, referenceWire } from './engine-cases.ts';

const bare = aSpanWire({ ends: [endWith(), endWith()] });
const damped = aSpanWire({ ends: [endWith(1, 2.2), endWith(1.1)] });
const climate = {
  sectors: Array.from({ length: 12 }, (_, index) => ({
    directionRad: (index * Math.PI) / 6,
    shareRatio: 1 / 12,
    weibullScaleMPerS: 5,
    weibullShapeNumber: 2,
  })),
};

describe('assessing a span wire', () => {
  it('finds the worst place, limit and energies', () => {
    const { worst, energyAtWorst, outcome, endWorst, search } = assessSpanWire(damped, aBasis());
    expect(outcome).toBe('steady');
    expect(worst?.stressPa).toBeCloseTo((worst?.utilisationRatio ?? NaN) * 8.5e6, 3);
    expect(worst?.strainRatio).toBeCloseTo((worst?.stressPa ?? NaN) / 69e9, 12);
    expect(energyAtWorst?.closureRatio).toBeLessThanOrEqual(1e-8);
    expect(endWorst[worst?.endIndex ?? 0]?.stressPa).toBeGreaterThanOrEqual((worst?.stressPa ?? NaN) * 0.999);
    expect(search.worstErrorRatio).toBeLessThan(1e-4);
  });

  it('finds the same worst stress as a sweep fifty times finer, within the error it states', () => {
    const coarse = assessSpanWire(damped, aBasis()).worst;
    const fine = spanWireSeries(damped, aBasis({ frequencyCount: 5000 })).rows;
    const finest = Math.max(...fine.map((row) => row.utilisationRatio ?? 0));
    expect(Math.abs((coarse?.utilisationRatio ?? NaN) / finest - 1)).toBeLessThan(1e-4);
  });

  it('does not lose a sharp resonance of a damper between two frequencies', () => {
    const halves = referenceDamper.kind === 'halves' ? referenceDamper.halves : [];
    const model: DamperModel = {
      kind: 'halves',
      clampMassKg: 0.4,
      halves: halves.map((h) => ({ ...h, lossRatio: 0.002 })),
    };
    const sharp = aSpanWire({ ends: [{ dampers: [{ distanceM: 1, model }] }, endWith()] });
    const found = assessSpanWire(sharp, aBasis({ frequencyCount: 40 })).worst?.utilisationRatio ?? NaN;
    const fine = spanWireSeries(sharp, aBasis({ frequencyCount: 5000 })).rows;
    expect(found).toBeGreaterThan(0.98 * Math.max(...fine.map((row) => row.utilisationRatio ?? 0)));
  });

  it('takes the strain limit at ends with dampers by its convention', () => {
    const limit = (convention: 'peak-to-peak' | 'zero-to-peak') => {
      const damperedStrain = { strainRatio: 100e-6, convention, source: 'test' };
      return assessSpanWire(damped, aBasis({ damperedStrain })).worst;
    };
    expect(limit('peak-to-peak')?.limitStressPa).toBeCloseTo(50e-6 * 69e9, 3);
    expect(limit('zero-to-peak')?.limitStressPa).toBeCloseTo(100e-6 * 69e9, 3);
    expect(limit('peak-to-peak')?.limitKind).toBe('dampered-strain');
    const undamped = assessSpanWire(
      bare,
      aBasis({ damperedStrain: { strainRatio: 1e-6, convention: 'peak-to-peak', source: 't' } }),
    );
    expect(undamped.worst?.limitKind).toBe('endurance-stress');
  });

  it('gives the band over the limit where one is', () => {
    const over = assessSpanWire(bare, aBasis({ endurance: { stressPa: 4e6, source: 'test' } }));
    expect(over.worst?.utilisationRatio).toBeGreaterThan(1);
    expect(over.exceedance?.frequencyLowerHz).toBeLessThan(over.worst?.frequencyHz ?? NaN);
    expect(over.exceedance?.frequencyUpperHz).toBeGreaterThan(over.worst?.frequencyHz ?? NaN);
    expect(assessSpanWire(damped, aBasis()).exceedance).toBeNull();
  });

  it('gives the same with kept end responses, and keeps them', () => {
    const cache = createEndResponseCache();
    const first = assessSpanWire(damped, aBasis({ climate }), cache);
    expect(cache.missCount).toBe(2);
    expect(assessSpanWire(damped, aBasis({ climate }), cache)).toEqual(first);
    expect(cache.hitCount).toBe(2);
    expect(assessSpanWire(damped, aBasis({ climate }))).toEqual(first);
    assessSpanWire({ ...damped, span: { ...damped.span, tensionN: 26_000 } }, aBasis(), cache);
    expect(cache.missCount).toBe(4);
  });

  it('sums the life over the climate as by hand', () => {
    const oneSector: VibrationBasis['climate'] = {
      sectors: [{ directionRad: Math.PI / 2, shareRatio: 0.4, weibullScaleMPerS: 4, weibullShapeNumber: 2 }],
    };
    const input = { ...bare, span: { ...bare.span, bearingRad: 0 } };
    const { life, warnings } = assessSpanWire(input, aBasis({ climate: oneSector }));
    const { rows } = spanWireSeries(input, aBasis());
    const step = 6 / 149;
    const damage = rows.reduce((sum, row, index) => {
      const lower = index === 0 ? 1 : row.windSpeedMPerS - step / 2;
      const upper = index === 149 ? 7 : row.windSpeedMPerS + step / 2;
      const share = 0.4 * weibullShare({ scaleMPerS: 4, shapeNumber: 2 }, lower, upper);
      const cycles = share * hoursPerYearCount * 3600 * row.frequencyHz;
      return sum + cycles / fatigueCycles(safeBorderLines['multi-layer'], row.clampStressPa[0] ?? NaN);
    }, 0);
    expect(life.outcome).toBe('finite');
    if (life.outcome === 'finite') expect(life.years * damage).toBeCloseTo(1, 9);
    expect(warnings.map((warning) => warning.code)).toContain('coarse-climate');
  });

  it('has no life along the wind, and none without a climate', () => {
    const along = {
      sectors: [{ directionRad: bare.span.bearingRad, shareRatio: 1, weibullScaleMPerS: 5, weibullShapeNumber: 2 }],
    };
    expect(assessSpanWire(bare, aBasis({ climate: along })).life).toEqual({ outcome: 'unlimited' });
    expect(assessSpanWire(bare, aBasis()).life).toEqual({ outcome: 'no-climate' });
  });

  it('falls back from a law outside its validity with a warning, and names what it used', () => {
    const thin = { ...damped, wire: { ...referenceWire, diameterM: 0.011 }, ends: [endWith(), endWith()] as const };
    const result = assessSpanWire(thin, aBasis({ methods: { selfDamping: 'self-damping-power-noiseux' } }));
    expect(result.warnings.map((warning) => warning.code)).toContain('self-damping-out-of-validity');
    expect(result.methods.map((method) => method.name)).toContain('self-damping-similarity');
  });

  it('computes what a damper table covers and says what it leaves out', () => {
    const rows = [10, 20, 30].map((frequencyHz) => ({ frequencyHz, realNsPerM: 150, imaginaryNsPerM: 40 }));
    const table: DamperModel = { kind: 'table', rows };
    const partly = assessSpanWire(
      aSpanWire({ ends: [{ dampers: [{ distanceM: 1, model: table }] }, endWith()] }),
      aBasis(),
    );
    expect(partly.outcome).toBe('steady');
    expect(partly.warnings.map((warning) => warning.code)).toContain('no-damper-data');
    const far: DamperModel = {
      kind: 'table',
      rows: rows.map((row) => ({ ...row, frequencyHz: row.frequencyHz + 200 })),
    };
    const none = assessSpanWire(
      aSpanWire({ ends: [{ dampers: [{ distanceM: 1, model: far }] }, endWith()] }),
      aBasis(),
    );
    expect(none).toMatchObject({ outcome: 'no-damper-data', worst: null, energyAtWorst: null });
  });
});

describe('the profile', () => {
  it('carries the flux of each end to that end', () => {
    const { worst, energyAtWorst } = assessSpanWire(damped, aBasis());
    const profile = spanWireProfile(damped, aBasis(), { frequencyHz: worst?.frequencyHz ?? NaN });
    expect(profile.positionsM).toHaveLength(121);
    expect(-(profile.fluxesW[0] ?? NaN)).toBeCloseTo(energyAtWorst?.endPowerW[0] ?? NaN, 12);
    expect(profile.fluxesW.at(-1)).toBeCloseTo(energyAtWorst?.endPowerW[1] ?? NaN, 12);
    expect(profile.positionsM.at(-1)).toBeCloseTo(350, 9);
  });
});

const refusals: readonly (readonly [string, () => unknown])[] = [
  [
    'span.tensionN',
    () => assessSpanWire(aSpanWire({ span: { lengthM: 350, tensionN: 150_000, bearingRad: 0 } }), aBasis()),
  ],
  [
    'span.lengthM',
    () => assessSpanWire(aSpanWire({ span: { lengthM: -3, tensionN: referenceTensionN, bearingRad: 0 } }), aBasis()),
  ],
  [
    'span.lengthM',
    () => assessSpanWire(aSpanWire({ span: { lengthM: NaN, tensionN: referenceTensionN, bearingRad: 0 } }), aBasis()),
  ],
  [
    'span.bearingRad',
    () =>
      assessSpanWire(
        aSpanWire({ span: { lengthM: 300, tensionN: referenceTensionN, bearingRad: Infinity } }),
        aBasis(),
      ),
  ],
  ['ends[0].dampers[0].distanceM', () => assessSpanWire(aSpanWire({ ends: [endWith(400), endWith()] }), aBasis())],
  ['ends[1].dampers[1].distanceM', () => assessSpanWire(aSpanWire({ ends: [endWith(), endWith(1, 1)] }), aBasis())],
  ['ends[1].dampers', () => assessSpanWire(aSpanWire({ ends: [endWith(200), endWith(180)] }), aBasis())],
  ['wire.diameterM', () => assessSpanWire(aSpanWire({ wire: { ...referenceWire, diameterM: 28.1 } }), aBasis())],
  [
    'wire.outerStrandDiameterM',
    () => assessSpanWire(aSpanWire({ wire: { ...referenceWire, outerStrandDiameterM: 0.05 } }), aBasis()),
  ],
  [
    'air.turbulenceIntensityRatio',
    () => assessSpanWire(aSpanWire({ air: { densityKgPerM3: 1.2, turbulenceIntensityRatio: 18 } }), aBasis()),
  ],
  ['windBand.upperMPerS', () => assessSpanWire(bare, aBasis({ windBand: { lowerMPerS: 7, upperMPerS: 1 } }))],
  ['frequencyCount', () => assessSpanWire(bare, aBasis({ frequencyCount: 10.5 }))],
  ['methods.windPower', () => assessSpanWire(bare, aBasis({ methods: { windPower: 'unheard-of' } }))],
  ['curves.windPower', () => assessSpanWire(bare, aBasis({ methods: { windPower: 'wind-power-user-table' } }))],
  [
    'climate.sectors[0].weibullScaleMPerS',
    () =>
      assessSpanWire(
        bare,
        aBasis({
          climate: { sectors: [{ directionRad: 0, shareRatio: 1, weibullScaleMPerS: 0, weibullShapeNumber: 2 }] },
        }),
      ),
  ],
  ['endurance.stressPa', () => assessSpanWire(bare, aBasis({ endurance: { stressPa: 0, source: '' } }))],
];

describe('input that cannot be', () => {
  it.each(refusals)('is refused by name: %s', (path, run) => {
    const refused = (() => {
      try {
        run();
        return null;
      } catch (error) {
        return error;
      }
    })();
    if (!(refused instanceof EngineInputError)) throw new Error('it was taken, or failed for another reason');
    expect(refused.path).toBe(path);
  });
});
