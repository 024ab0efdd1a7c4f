import { assertNumber } from '../numerics/assert-number.ts';
import type { SelfDampingLaw } from './self-damping-law.ts';

/** A fitted power law, P[mW/m] = coefficient·(A/D)^l·f^m/T^n, f in Hz, T in kN. */
export interface SelfDampingFit {
  readonly coefficientNumber: number;
  readonly amplitudeExponentNumber: number;
  readonly frequencyExponentNumber: number;
  readonly tensionExponentNumber: number;
}

const nPerKn = 1000;
const wPerMw = 1e-3;

/**
 * Self-damping of a wire from a fit to measurements.
 *
 * @param fit      coefficient > 0; exponents l 2 to 4, m 0 to 10, n −10 to 10
 * @param tensionN T, scalar [N], > 0
 * @returns law of the wire at that tension
 * @throws EngineInputError naming the field in `curves.selfDamping`; l below 2 would allow several steady states
 * @source that of the fit
 * @validity conductor, tensions and frequencies of the measurements
 * @accuracy that of the fit
 */
export function userFitSelfDamping(fit: SelfDampingFit, tensionN: number): SelfDampingLaw {
  const path = 'curves.selfDamping';
  assertNumber(`${path}.coefficientNumber`, fit.coefficientNumber, { above: 0, atMost: 1e12 });
  assertNumber(`${path}.amplitudeExponentNumber`, fit.amplitudeExponentNumber, { atLeast: 2, atMost: 4 });
  assertNumber(`${path}.frequencyExponentNumber`, fit.frequencyExponentNumber, { atLeast: 0, atMost: 10 });
  assertNumber(`${path}.tensionExponentNumber`, fit.tensionExponentNumber, { atLeast: -10, atMost: 10 });
  return {
    factor: (wPerMw * fit.coefficientNumber) / (tensionN / nPerKn) ** fit.tensionExponentNumber,
    amplitudeExponentNumber: fit.amplitudeExponentNumber,
    frequencyExponentNumber: fit.frequencyExponentNumber,
  };
}
