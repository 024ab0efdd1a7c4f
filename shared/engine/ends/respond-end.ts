import { damperImpedance } from '../dampers/damper-impedance.ts';
import type { DamperModel } from '../dampers/damper-model.ts';
import { clampResponse, type ImpedanceSeries } from './clamp-response.ts';
import type { ClampedWire } from './clamped-wire.ts';
import type { EndResponse } from './end-response.ts';
import type { PreparedEnd } from './prepare-end.ts';

/** Impedances of the damper models met in one sweep, so that one model is evaluated once. */
export type ImpedanceStore = Map<DamperModel, ImpedanceSeries>;

/**
 * Response of a checked end at each frequency of a clamped wire.
 *
 * @param wire clamped wire at the frequencies, [n]
 * @param end   checked end
 * @param from.bendingStiffnessNm2 EI, scalar [N·m²], > 0
 * @param from.impedances models evaluated before for the same frequencies; added to
 * @returns reflection, curvatures and damper motions, dampers in the order of the input
 * @source closed form, see clampResponse
 * @validity see clampResponse
 * @accuracy see clampResponse
 */
export function respondEnd(
  wire: ClampedWire,
  end: PreparedEnd,
  from: { readonly bendingStiffnessNm2: number; readonly impedances: ImpedanceStore },
): EndResponse {
  const impedances = end.models.map((model) => {
    const known = from.impedances.get(model);
    if (known !== undefined) return known;
    const series = damperImpedance(model, wire.waves);
    from.impedances.set(model, series);
    return series;
  });
  const response = clampResponse(wire, {
    clampReflectionRatio: end.clampReflectionRatio,
    bendingStiffnessNm2: from.bendingStiffnessNm2,
    distancesM: end.distancesM,
    impedances,
  });
  if (end.inputIndexes.every((input, place) => input === place)) return response;
  const inInputOrder = (series: readonly Float64Array[]) =>
    end.inputIndexes.map((_, input) => series[end.inputIndexes.indexOf(input)] ?? new Float64Array(0));
  return {
    ...response,
    damperCurvaturePerM2: inInputOrder(response.damperCurvaturePerM2),
    damperMotionRatio: inInputOrder(response.damperMotionRatio),
  };
}
