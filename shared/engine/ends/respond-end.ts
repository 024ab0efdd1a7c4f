import { damperImpedance } from '../dampers/damper-impedance.ts';
import type { DamperModel } from '../dampers/damper-model.ts';
import type { WaveTable } from '../waves/wave-table.ts';
import { clampResponse, type ImpedanceSeries } from './clamp-response.ts';
import type { EndResponse } from './end-response.ts';
import type { PreparedEnd } from './prepare-end.ts';

/** Impedances of the damper models met in one sweep, so that one model is evaluated once. */
export type ImpedanceStore = Map<DamperModel, ImpedanceSeries>;

/**
 * Response of a checked end at each frequency of a wave table.
 *
 * @param table wave numbers of the wire, [n]
 * @param end   checked end
 * @param from.bendingStiffnessNm2 EI, scalar [N·m²], > 0
 * @param from.impedances models evaluated before for the same table; added to
 * @returns reflection, curvatures and damper motions, dampers in the order of the input
 * @source closed form, see clampResponse
 * @validity see clampResponse
 * @accuracy see clampResponse
 */
export function respondEnd(
  table: WaveTable,
  end: PreparedEnd,
  from: { readonly bendingStiffnessNm2: number; readonly impedances: ImpedanceStore },
): EndResponse {
  const impedances = end.models.map((model) => {
    const known = from.impedances.get(model);
    if (known !== undefined) return known;
    const series = damperImpedance(model, table);
    from.impedances.set(model, series);
    return series;
  });
  const response = clampResponse(table, {
    clampReflectionRatio: end.clampReflectionRatio,
    bendingStiffnessNm2: from.bendingStiffnessNm2,
    distancesM: end.distancesM,
    impedances,
  });
  const inInputOrder = (series: readonly Float64Array[]) =>
    end.inputIndexes.map((_, input) => series[end.inputIndexes.indexOf(input)] ?? new Float64Array(0));
  return {
    ...response,
    damperCurvaturePerM2: inInputOrder(response.damperCurvaturePerM2),
    damperMotionRatio: inInputOrder(response.damperMotionRatio),
  };
}
