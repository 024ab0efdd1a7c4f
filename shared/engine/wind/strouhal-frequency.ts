import { assertNumber } from '../numerics/assert-number.ts';

/** A wire in a wind whose vortices follow a Strouhal number. */
export interface StrouhalWire {
  readonly strouhalNumber: number;
  readonly diameterM: number;
}

/** St of the trade form f = 3.26·V[mph]/d[in]. @source common practice: 3.26 · 0.0254/0.44704 */
export const tradeStrouhalNumber = (3.26 * 0.0254) / 0.44704;

function assertStrouhalWire({ strouhalNumber, diameterM }: StrouhalWire): void {
  assertNumber('strouhalNumber', strouhalNumber, { above: 0 });
  assertNumber('diameterM', diameterM, { above: 0 });
}

/**
 * Frequency at which vortices leave a wire, f = St·V/D.
 *
 * @param wire           St and D [m], scalars, > 0
 * @param windSpeedMPerS V normal to the wire, scalar [m/s], ≥ 0
 * @returns f, scalar [Hz]
 * @throws EngineInputError if an input is outside the bounds above
 * @source closed form: definition of the Strouhal number
 * @validity Reynolds number about 500 to 300 000
 * @accuracy that of the Strouhal number, 0.18 to 0.22 on conductors
 */
export function strouhalFrequency(wire: StrouhalWire, windSpeedMPerS: number): number {
  assertStrouhalWire(wire);
  assertNumber('windSpeedMPerS', windSpeedMPerS, { atLeast: 0 });
  return (wire.strouhalNumber * windSpeedMPerS) / wire.diameterM;
}

/**
 * Wind speed that excites a frequency, V = f·D/St.
 *
 * @param wire        St and D [m], scalars, > 0
 * @param frequencyHz f, scalar [Hz], ≥ 0
 * @returns V, scalar [m/s]
 * @throws EngineInputError if an input is outside the bounds above
 * @source closed form: definition of the Strouhal number
 * @validity see strouhalFrequency
 * @accuracy see strouhalFrequency
 */
export function strouhalWindSpeed(wire: StrouhalWire, frequencyHz: number): number {
  assertStrouhalWire(wire);
  assertNumber('frequencyHz', frequencyHz, { atLeast: 0 });
  return (frequencyHz * wire.diameterM) / wire.strouhalNumber;
}
