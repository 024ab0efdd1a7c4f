import { assertNumber } from '../numerics/assert-number.ts';
import { catenaryMeanTension, catenarySlack } from './catenary.ts';

/** One state of a ruling span: load per length and temperature. */
export interface WireState {
  readonly weightNPerM: number;
  readonly temperatureK: number;
}

/** A change from a state of known tension to another. */
export interface StateChange {
  readonly rulingSpanM: number;
  readonly axialStiffnessN: number;
  readonly expansionPerK: number;
  readonly from: WireState & { readonly tensionN: number };
  /** creepRatio is the permanent strain gained since the first state; 0 when left out. */
  readonly to: WireState & { readonly creepRatio?: number };
}

/** Tension after the change, or why there is none. */
export type ChangedTension =
  | { readonly outcome: 'steady'; readonly tensionN: number }
  | { readonly outcome: 'not-converged'; readonly iterationCount: number };

const iterationLimit = 200;
const closeRatio = 1e-13;

function assertStateChange(change: StateChange): void {
  assertNumber('rulingSpanM', change.rulingSpanM, { above: 0 });
  assertNumber('axialStiffnessN', change.axialStiffnessN, { above: 0 });
  assertNumber('expansionPerK', change.expansionPerK, { atLeast: 0 });
  assertNumber('from.tensionN', change.from.tensionN, { above: 0 });
  assertNumber('from.weightNPerM', change.from.weightNPerM, { above: 0 });
  assertNumber('from.temperatureK', change.from.temperatureK, { atLeast: 0 });
  assertNumber('to.weightNPerM', change.to.weightNPerM, { above: 0 });
  assertNumber('to.temperatureK', change.to.temperatureK, { atLeast: 0 });
  assertNumber('to.creepRatio', change.to.creepRatio ?? 0, { atLeast: 0 });
}

/** Root of a rising function, bracketed from a start by doubling and closed by bisection in the logarithm. */
function risingRoot(excess: (tensionN: number) => number, startN: number): ChangedTension {
  let low = startN;
  let high = startN;
  let iterationCount = 0;
  while (excess(low) > 0 && iterationCount < iterationLimit) {
    low /= 2;
    iterationCount += 1;
  }
  while (excess(high) < 0 && iterationCount < iterationLimit) {
    high *= 2;
    iterationCount += 1;
  }
  while (high - low > closeRatio * high && iterationCount < iterationLimit) {
    const middle = Math.sqrt(low * high);
    if (middle <= low || middle >= high) break;
    if (excess(middle) < 0) low = middle;
    else high = middle;
    iterationCount += 1;
  }
  const tensionN = Math.sqrt(low * high);
  return iterationCount < iterationLimit
    ? { outcome: 'steady', tensionN }
    : { outcome: 'not-converged', iterationCount };
}

/**
 * Horizontal tension of a ruling span after a change of temperature and load, parabolic:
 * H₂/EA − w₂²S²/(24H₂²) = H₁/EA − w₁²S²/(24H₁²) − α(t₂ − t₁) − ε_creep.
 *
 * @param change.rulingSpanM      S, scalar [m], > 0
 * @param change.axialStiffnessN  EA, scalar [N], > 0
 * @param change.expansionPerK    α, scalar [1/K], ≥ 0
 * @param change.from             H₁ [N], w₁ [N/m], t₁ [K]
 * @param change.to               w₂ [N/m], t₂ [K], creep strain gained [ratio], ≥ 0
 * @returns steady tension [N], or not-converged
 * @throws EngineInputError naming the field outside its bounds
 * @source closed form: equal unstressed length, strain H/EA
 * @validity level ruling span, linear elastic wire, sag below a tenth of the span
 * @accuracy 1e-12 relative of the stated equation
 */
export function stateChange(change: StateChange): ChangedTension {
  assertStateChange(change);
  const { rulingSpanM: S, axialStiffnessN: EA, from, to } = change;
  const strain = (w: number, H: number) => H / EA - (w * S) ** 2 / (24 * H ** 2);
  const lengthening = change.expansionPerK * (to.temperatureK - from.temperatureK) + (to.creepRatio ?? 0);
  const target = strain(from.weightNPerM, from.tensionN) - lengthening;
  return risingRoot((H) => strain(to.weightNPerM, H) - target, from.tensionN);
}

/**
 * Horizontal tension of a ruling span after a change of temperature and load, by catenary lengths.
 *
 * @param change as for the parabolic state change
 * @returns steady tension [N], or not-converged
 * @throws EngineInputError naming the field outside its bounds
 * @source closed form: catenary length over (1 + T/EA), T the mean tension, grows by α(t₂ − t₁) and creep
 * @validity level ruling span, linear elastic wire; sag below about half the span, where the mean tension still rises with H
 * @accuracy 1e-10 relative of the stated equation
 */
export function stateChangeCatenary(change: StateChange): ChangedTension {
  assertStateChange(change);
  const { rulingSpanM: S, axialStiffnessN: EA, from, to } = change;
  // Logarithms of the length ratio keep the small slack apart from the span.
  const strain = (w: number, H: number) => {
    const steepNumber = (w * S) / (2 * H);
    // Steeper, more horizontal tension would mean less tension: no wire of a line hangs so.
    const widestNumber = 1;
    if (steepNumber > widestNumber) return Number.NEGATIVE_INFINITY;
    const span = { lengthM: S, tensionN: H, weightNPerM: w };
    return Math.log1p(catenaryMeanTension(span) / EA) - Math.log1p(catenarySlack(span) / S);
  };
  const lengthening = change.expansionPerK * (to.temperatureK - from.temperatureK) + (to.creepRatio ?? 0);
  const target = strain(from.weightNPerM, from.tensionN) - Math.log1p(lengthening);
  return risingRoot((H) => strain(to.weightNPerM, H) - target, from.tensionN);
}
