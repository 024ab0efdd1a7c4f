import { assertNumber } from '../numerics/assert-number.ts';
import { stringWaveSpeed } from '../waves/string-wave.ts';
import type { StringState } from '../waves/wave-state.ts';

/** Wire at a fixed end. */
export interface FixedEndWire {
  readonly massKgPerM: number;
  readonly bendingStiffnessNm2: number;
  readonly outerStrandDiameterM: number;
}

function strainPerSpeed(wire: FixedEndWire): number {
  assertNumber('massKgPerM', wire.massKgPerM, { above: 0 });
  assertNumber('bendingStiffnessNm2', wire.bendingStiffnessNm2, { above: 0 });
  assertNumber('outerStrandDiameterM', wire.outerStrandDiameterM, { above: 0 });
  return Math.PI * wire.outerStrandDiameterM * Math.sqrt(wire.massKgPerM / wire.bendingStiffnessNm2);
}

/**
 * Bending strain at a fixed end from frequency times antinode amplitude, ε = π·d·√(m/EI)·fA.
 *
 * @param wire               m, EI, d, scalars, > 0
 * @param frequencyAmplitudeMPerS f·A, A zero to peak, scalar [m/s], ≥ 0
 * @returns ε zero to peak, scalar [ratio]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form; the tension drops out. Attributed to the EPRI reference book, not read
 * @validity rigid clamp without dampers; the exact factor is √(1 + (k/κ)²), 1.002 at 45 Hz on a usual wire
 * @accuracy of order (k/κ)²
 */
export function antinodeStrain(wire: FixedEndWire, frequencyAmplitudeMPerS: number): number {
  assertNumber('frequencyAmplitudeMPerS', frequencyAmplitudeMPerS, { atLeast: 0 });
  return strainPerSpeed(wire) * frequencyAmplitudeMPerS;
}

/**
 * Largest frequency times antinode amplitude for a strain at a fixed end.
 *
 * @param wire        m, EI, d, scalars, > 0
 * @param strainRatio ε zero to peak, scalar [ratio], ≥ 0
 * @returns f·A, scalar [m/s]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form, see antinodeStrain
 * @validity see antinodeStrain
 * @accuracy see antinodeStrain
 */
export function antinodeSpeedLimit(wire: FixedEndWire, strainRatio: number): number {
  assertNumber('strainRatio', strainRatio, { atLeast: 0 });
  return strainRatio / strainPerSpeed(wire);
}

/**
 * Slope of the wire at its end (vibration angle), 2πfA/c.
 *
 * @param wire         m [kg/m] and T [N], scalars, > 0
 * @param frequencyAmplitudeMPerS f·A, A zero to peak at the antinode, scalar [m/s], ≥ 0
 * @returns angle, scalar [rad]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form: slope of a standing wave at its node
 * @validity string
 * @accuracy exact
 */
export function vibrationAngle(wire: StringState, frequencyAmplitudeMPerS: number): number {
  assertNumber('frequencyAmplitudeMPerS', frequencyAmplitudeMPerS, { atLeast: 0 });
  return (2 * Math.PI * frequencyAmplitudeMPerS) / stringWaveSpeed(wire);
}
