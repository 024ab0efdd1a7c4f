import type { DamperModel, SpanEnd, SpanWireCase, VibrationBasis, WireProperties } from '#shared/engine/index.ts';

/** 795 kcmil 26/7; values of the worked example, their origin not read. */
export const referenceWire: WireProperties = {
  diameterM: 0.028143,
  massKgPerM: 1.62656,
  ratedStrengthN: 138_785,
  bendingStiffnessMinNm2: 44.06,
  outerStrandDiameterM: 0.0044415,
  outerStrandModulusPa: 69e9,
};

/** Tension of 20 % of the rated strength. */
export const referenceTensionN = 27_757;

/** Damper of the worked example. */
export const referenceDamper: DamperModel = {
  kind: 'halves',
  clampMassKg: 0.4,
  halves: [
    { massKg: 1.5, inertiaKgM2: 0.004, armLengthM: 0.2, armStiffnessNm2: 30, offsetM: 0.05, lossRatio: 0.3 },
    { massKg: 2.5, inertiaKgM2: 0.01, armLengthM: 0.26, armStiffnessNm2: 30, offsetM: 0.05, lossRatio: 0.3 },
  ],
};

/** An end with the reference damper at each distance. */
export const endWith = (...distancesM: number[]): SpanEnd => ({
  clampReflectionRatio: 1,
  dampers: distancesM.map((distanceM) => ({ distanceM, model: referenceDamper })),
});

/** A span of the reference wire; parts can be replaced. */
export function aSpanWire(parts: Partial<SpanWireCase> = {}): SpanWireCase {
  return {
    wire: referenceWire,
    span: { lengthM: 350, tensionN: referenceTensionN, bearingRad: 0.3 },
    air: { densityKgPerM3: 1.225, turbulenceIntensityRatio: 0.18 },
    ends: [endWith(1), endWith()],
    ...parts,
  };
}

/** A basis with an endurance limit, no climate and default methods; parts can be replaced. */
export function aBasis(parts: Partial<VibrationBasis> = {}): VibrationBasis {
  return {
    windBand: { lowerMPerS: 1, upperMPerS: 7 },
    frequencyCount: 150,
    methods: {},
    endurance: { stressPa: 8.5e6, source: 'from memory: multi-layer conductors' },
    damperedStrain: null,
    fatigueCurve: 'multi-layer',
    climate: null,
    ...parts,
  };
}
