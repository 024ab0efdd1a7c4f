import { assertNumber } from '../numerics/assert-number.ts';
import { EngineInputError } from '../numerics/engine-input-error.ts';

/** Wind band of a sweep and how many frequencies it gets. */
export interface WindGridInput {
  readonly windBand: { readonly lowerMPerS: number; readonly upperMPerS: number };
  readonly frequencyCount: number;
}

/** @source common practice: bounds that refuse slips of the pen */
const speedLimits = { atLeast: 0.1, atMost: 40 } as const;
const countLimits = { atLeast: 2, atMost: 5000 } as const;

/**
 * Frequencies of a sweep, evenly spaced in wind speed from the lower to the upper end of the band.
 *
 * @param basis band with lower < upper [m/s] and number of frequencies
 * @param wire.diameterM D, scalar [m]; wire.strouhalNumber St, scalar
 * @returns f = St·V/D, [n] [Hz]
 * @throws EngineInputError naming the band or the count
 * @source closed form: definition of the Strouhal number
 * @validity wind normal to the span
 * @accuracy exact
 */
export function windGridFrequencies(
  basis: WindGridInput,
  wire: { readonly diameterM: number; readonly strouhalNumber: number },
): Float64Array {
  const { lowerMPerS, upperMPerS } = basis.windBand;
  assertNumber('windBand.lowerMPerS', lowerMPerS, speedLimits);
  assertNumber('windBand.upperMPerS', upperMPerS, speedLimits);
  assertNumber('frequencyCount', basis.frequencyCount, countLimits);
  if (!Number.isInteger(basis.frequencyCount)) throw new EngineInputError('frequencyCount', 'must be a whole number');
  if (upperMPerS <= lowerMPerS) throw new EngineInputError('windBand.upperMPerS', 'must be above the lower end');
  const step = (upperMPerS - lowerMPerS) / (basis.frequencyCount - 1);
  const factor = wire.strouhalNumber / wire.diameterM;
  return Float64Array.from({ length: basis.frequencyCount }, (_, index) => factor * (lowerMPerS + step * index));
}
