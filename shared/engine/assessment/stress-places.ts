import type { SpanSetup } from '../span/span-setup.ts';
import { outcomeCodes, type SpanSweep } from '../span/sweep-span.ts';
import type { VibrationBasis } from './span-wire-assessment.ts';

/** The limit that governs at one end, as stress of the outer strand, zero to peak. */
export interface EndLimit {
  readonly stressPa: number;
  readonly kind: 'endurance-stress' | 'dampered-strain';
  readonly source: string;
}

/** A place where the wire bends: the clamp of an end, or one of its damper clamps. */
export interface StressPlace {
  readonly endIndex: 0 | 1;
  /** Position in the end's list of dampers; null at the wire clamp. */
  readonly damperIndex: number | null;
  readonly limit: EndLimit;
  readonly curvaturesPerM2: Float64Array;
  readonly amplitudesM: Float64Array;
}

/** The worst use of a limit at each frequency of a sweep; −1 where a damper has no data. */
export interface StressEnvelope {
  readonly utilisations: Float64Array;
  readonly placeIndexes: Uint8Array;
}

/**
 * Limit that governs at an end: the endurance limit, or the strain limit for ends with dampers where that is lower.
 *
 * @param basis       limits; a strain limit peak to peak counts as half of it zero to peak
 * @param end.damperCount number of dampers, whole number
 * @param end.modulusPa   E of the outer strand, scalar [Pa]
 * @returns stress [Pa], zero to peak, with its kind and source
 * @source closed form on the basis
 * @validity the conductor kind the basis means
 * @accuracy exact
 */
export function endLimit(
  basis: VibrationBasis,
  end: { readonly damperCount: number; readonly modulusPa: number },
): EndLimit {
  const { endurance, damperedStrain } = basis;
  const enduranceLimit: EndLimit = { stressPa: endurance.stressPa, kind: 'endurance-stress', source: endurance.source };
  if (damperedStrain === null || end.damperCount === 0) return enduranceLimit;
  const zeroToPeakRatio = damperedStrain.strainRatio / (damperedStrain.convention === 'peak-to-peak' ? 2 : 1);
  const stressPa = zeroToPeakRatio * end.modulusPa;
  if (stressPa >= endurance.stressPa) return enduranceLimit;
  return { stressPa, kind: 'dampered-strain', source: damperedStrain.source };
}

/** Every place of a span where the wire bends, with its curvature and amplitude over the frequencies of a sweep. */
export function stressPlaces(setup: SpanSetup, basis: VibrationBasis, sweep: SpanSweep): StressPlace[] {
  return ([0, 1] as const).flatMap((endIndex) => {
    const { clampCurvaturePerM2, damperCurvaturePerM2 } = sweep.responses[endIndex];
    const modulusPa = setup.wire.outerStrandModulusPa;
    const limit = endLimit(basis, { damperCount: damperCurvaturePerM2.length, modulusPa });
    const amplitudesM = sweep.endAmplitudesM[endIndex];
    const clamp: StressPlace = {
      endIndex,
      damperIndex: null,
      limit,
      amplitudesM,
      curvaturesPerM2: clampCurvaturePerM2,
    };
    const dampers = damperCurvaturePerM2.map((curvaturesPerM2, damperIndex): StressPlace => ({
      ...clamp,
      damperIndex,
      curvaturesPerM2,
    }));
    return [clamp, ...dampers];
  });
}

/** Stress over curvature: modulus times half the diameter of the outer strand. */
export function stressPerCurvature(setup: SpanSetup): number {
  return (setup.wire.outerStrandModulusPa * setup.wire.outerStrandDiameterM) / 2;
}

/** Worst use of a limit over all places, at each frequency. */
export function stressEnvelope(setup: SpanSetup, places: readonly StressPlace[], sweep: SpanSweep): StressEnvelope {
  const count = sweep.frequenciesHz.length;
  const utilisations = new Float64Array(count);
  const placeIndexes = new Uint8Array(count);
  const factor = stressPerCurvature(setup);
  places.forEach(({ curvaturesPerM2, amplitudesM, limit }, placeIndex) => {
    const scale = factor / limit.stressPa;
    for (let index = 0; index < count; index += 1) {
      const used = scale * (curvaturesPerM2[index] as number) * (amplitudesM[index] as number);
      if (used <= (utilisations[index] as number)) continue;
      utilisations[index] = used;
      placeIndexes[index] = placeIndex;
    }
  });
  for (let index = 0; index < count; index += 1) {
    if (sweep.outcomeCodes[index] === outcomeCodes['no-damper-data']) utilisations[index] = -1;
  }
  return { utilisations, placeIndexes };
}
