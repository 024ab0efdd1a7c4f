import { assertNumber } from '../numerics/assert-number.ts';
import { strouhalFrequency, type StrouhalWire } from '../wind/strouhal-frequency.ts';
import { stringWaveSpeed } from '../waves/string-wave.ts';
import type { StringState } from '../waves/wave-state.ts';

/** Wind of the shortest loop and the share of that loop at which a damper sits. */
export interface PlacementRule {
  readonly loopShareRatio: number;
  readonly windSpeedMPerS: number;
}

/**
 * Damper distance as a share of the loop at the highest wind, q·c/(2·St·V/D).
 *
 * @param wire m, T, D, St, scalars, > 0
 * @param rule q, scalar [ratio], 0 to 1, usually 0.7 to 0.85; V, scalar [m/s], > 0, usually 7
 * @returns distance from the last point of contact, scalar [m]
 * @throws EngineInputError if an input is outside its bounds
 * @source common practice: rule of thumb
 * @validity one damper per end; check the whole band
 * @accuracy a first guess
 */
export function ruleDistance(wire: StringState & StrouhalWire, rule: PlacementRule): number {
  assertNumber('loopShareRatio', rule.loopShareRatio, { above: 0, atMost: 1 });
  assertNumber('windSpeedMPerS', rule.windSpeedMPerS, { above: 0 });
  return (rule.loopShareRatio * stringWaveSpeed(wire)) / (2 * strouhalFrequency(wire, rule.windSpeedMPerS));
}

/**
 * Share of the antinode motion squared that a damper sees at a share of a loop from the node, sin²(πq).
 *
 * @param loopShareRatio q, scalar [ratio], ≥ 0
 * @returns share, scalar [ratio]
 * @source closed form: shape of a standing wave
 * @validity damper too light to change the shape
 * @accuracy exact for the shape
 */
export function damperMotionShare(loopShareRatio: number): number {
  assertNumber('loopShareRatio', loopShareRatio, { atLeast: 0 });
  return Math.sin(Math.PI * loopShareRatio) ** 2;
}

/** Ends of the frequency band for damper tests, times the diameter. @source from memory: IEC 61897 */
const testBand = { lowerMPerS: 0.18, upperMPerS: 1.4 } as const;

/**
 * Frequency band in which dampers are tested for a wire.
 *
 * @param diameterM D, scalar [m], > 0
 * @returns lower and upper frequency, scalars [Hz]
 * @throws EngineInputError if D is outside its bounds
 * @source from memory: IEC 61897, 0.18/D to 1.4/D; the table was not read
 * @validity Stockbridge dampers
 * @accuracy as recalled
 */
export function damperTestBand(diameterM: number): { lowerHz: number; upperHz: number } {
  assertNumber('diameterM', diameterM, { above: 0 });
  return { lowerHz: testBand.lowerMPerS / diameterM, upperHz: testBand.upperMPerS / diameterM };
}
