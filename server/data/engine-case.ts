import type { SpanEnd, SpanWireCase, VibrationBasis } from '#shared/engine/index.ts';
import { turbulenceIntensity } from '#shared/engine/index.ts';
import type { FrozenCase, FrozenConductor } from './frozen-input.ts';

const degreeRad = Math.PI / 180;

/** Limits that hold for one conductor under a basis, as stress at the outer strand, zero to peak. */
export interface Limits {
  readonly enduranceStressPa: number;
  readonly enduranceSource: string;
  readonly damperedStressPa: number | null;
}

/** Alloy strands have a lower endurance limit than aluminium ones; one aluminium layer a higher one than several. */
function enduranceStressPa(conductor: FrozenConductor, limits: FrozenCase['basis']['spec']['limits']): number {
  if (conductor.kind === 'AAAC' || conductor.kind === 'AACSR') return limits.enduranceAlloyPa;
  return conductor.aluminiumLayerCount > 1 ? limits.enduranceMultiLayerPa : limits.enduranceSingleLayerPa;
}

export function limitsOf({ basis, conductor }: FrozenCase): Limits {
  const { limits } = basis.spec;
  const zeroToPeakRatio =
    limits.damperedStrainRatio === null
      ? null
      : limits.damperedStrainRatio / (limits.damperedStrainConvention === 'peak-to-peak' ? 2 : 1);
  return {
    enduranceStressPa: enduranceStressPa(conductor, limits),
    enduranceSource: limits.enduranceSource,
    damperedStressPa: zeroToPeakRatio === null ? null : zeroToPeakRatio * conductor.outerStrandModulusPa,
  };
}

function endOf({ item, damperTypes }: FrozenCase, side: 'from' | 'to'): SpanEnd {
  const dampers = item.placements
    .filter((placement) => placement.side === side)
    .map(({ distanceM, damperTypeId }) => {
      const type = damperTypes[damperTypeId];
      if (type === undefined)
        throw new Error(`the frozen input names the damper type ${damperTypeId} and does not hold it`);
      return { distanceM, model: type.model };
    });
  return { clampReflectionRatio: 1, dampers };
}

/** What the engine needs of a frozen span wire, in its own units. */
export function engineCaseOf(frozen: FrozenCase): SpanWireCase {
  const { item, conductor, basis } = frozen;
  return {
    wire: {
      diameterM: conductor.diameterM,
      massKgPerM: conductor.massKgPerM,
      ratedStrengthN: conductor.ratedStrengthN,
      bendingStiffnessMinNm2: conductor.bendingStiffnessMinNm2,
      outerStrandDiameterM: conductor.outerStrandDiameterM,
      outerStrandModulusPa: conductor.outerStrandModulusPa,
    },
    span: { lengthM: item.spanLengthM, tensionN: item.tensionN, bearingRad: item.bearingDeg * degreeRad },
    air: {
      densityKgPerM3: basis.spec.airDensityKgPerM3,
      turbulenceIntensityRatio: turbulenceIntensity({ heightM: item.meanWireHeightM, roughnessM: item.roughnessM }),
    },
    ends: [endOf(frozen, 'from'), endOf(frozen, 'to')],
  };
}

/** The part of a basis that the engine applies, for one conductor. */
export function engineBasisOf(frozen: FrozenCase): VibrationBasis {
  const { spec } = frozen.basis;
  const { limits } = spec;
  return {
    windBand: spec.windBand,
    frequencyCount: spec.frequencyCount,
    methods: spec.methods,
    endurance: { stressPa: enduranceStressPa(frozen.conductor, limits), source: limits.enduranceSource },
    damperedStrain:
      limits.damperedStrainRatio === null
        ? null
        : {
            strainRatio: limits.damperedStrainRatio,
            convention: limits.damperedStrainConvention,
            source: limits.damperedStrainSource,
          },
    fatigueCurve: frozen.conductor.aluminiumLayerCount > 1 ? 'multi-layer' : 'single-layer',
    climate: frozen.climate === null ? null : { sectors: frozen.climate.sectors },
  };
}
