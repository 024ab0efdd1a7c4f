import { damperImpedance } from '../dampers/damper-impedance.ts';
import type { DamperModel } from '../dampers/damper-model.ts';
import { clampResponse, type ImpedanceSeries } from './clamp-response.ts';
import type { ClampedWire } from './clamped-wire.ts';
import type { EndResponse } from './end-response.ts';
import type { PreparedEnd } from './prepare-end.ts';
import { segmentResponse } from './segment-response.ts';
import type { ArmourRods } from './span-end.ts';
import type { WaveWire } from '../waves/wave-table.ts';

/** Impedances of the damper models met in one sweep, so that one model is evaluated once. */
export type ImpedanceStore = Map<DamperModel, ImpedanceSeries>;

/** What an end's response is computed from besides the end. */
export interface RespondFrom {
  readonly wire: WaveWire;
  readonly impedances: ImpedanceStore;
  /** Clamp velocities [n] of the end's dampers in the order of the input, for models that depend on them. */
  readonly velocities?: readonly Float64Array[] | undefined;
}

/** The parts of an end that only the general solver knows. */
function changes({ armourRods, support }: PreparedEnd, { waves }: ClampedWire, wire: WaveWire) {
  const covered =
    armourRods === null ? null : { lengthM: armourRods.lengthM, wire: { ...wire, ...rodWire(armourRods) } };
  if (support === null) return { wire, covered, support: null };
  const { massKg, stiffnessNPerM, dampingNsPerM } = support;
  const impedance: ImpedanceSeries = {
    re: waves.angularFrequenciesRadPerS.map(() => dampingNsPerM),
    im: waves.angularFrequenciesRadPerS.map((w) => w * massKg - stiffnessNPerM / w),
  };
  return { wire, covered, support: impedance };
}

const rodWire = ({ massKgPerM, bendingStiffnessNm2 }: ArmourRods) => ({ massKgPerM, bendingStiffnessNm2 });

/**
 * Response of a checked end at each frequency of a clamped wire.
 *
 * @param wire clamped wire at the frequencies, [n]
 * @param end   checked end
 * @param from.wire m, T and EI > 0 of the span's wire
 * @param from.impedances models evaluated before for the same frequencies; added to
 * @param from.velocities clamp velocities, for models that depend on them
 * @returns reflection, curvatures and damper motions, dampers in the order of the input
 * @source closed form, see clampResponse
 * @validity see clampResponse
 * @accuracy see clampResponse
 */
export function respondEnd(wire: ClampedWire, end: PreparedEnd, from: RespondFrom): EndResponse {
  const impedances = end.models.map((model, place) => {
    if (model.kind === 'velocity-tables') {
      return damperImpedance(model, wire.waves, from.velocities?.[end.inputIndexes[place] ?? place]);
    }
    const known = from.impedances.get(model);
    if (known !== undefined) return known;
    const series = damperImpedance(model, wire.waves);
    from.impedances.set(model, series);
    return series;
  });
  const { clampReflectionRatio, distancesM } = end;
  const isPlain = end.armourRods === null && end.support === null;
  const response = isPlain
    ? clampResponse(wire, {
        clampReflectionRatio,
        bendingStiffnessNm2: from.wire.bendingStiffnessNm2,
        distancesM,
        impedances,
      })
    : segmentResponse(
        { ...changes(end, wire, from.wire), clampReflectionRatio, distancesM, impedances },
        wire.waves.frequenciesHz,
      );
  if (end.inputIndexes.every((input, place) => input === place)) return response;
  const inInputOrder = (series: readonly Float64Array[]) =>
    end.inputIndexes.map((_, input) => series[end.inputIndexes.indexOf(input)] ?? new Float64Array(0));
  return {
    ...response,
    damperCurvaturePerM2: inInputOrder(response.damperCurvaturePerM2),
    damperMotionRatio: inInputOrder(response.damperMotionRatio),
  };
}
