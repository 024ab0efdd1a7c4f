import { assertNumber } from '../numerics/assert-number.ts';

/** A wire under tension that carries a wave of one frequency. */
export interface WaveState {
  readonly massKgPerM: number;
  readonly tensionN: number;
  /** Bending stiffness; 0 gives the string. */
  readonly bendingStiffnessNm2: number;
  readonly frequencyHz: number;
}

/** A string under tension. */
export interface StringState {
  readonly massKgPerM: number;
  readonly tensionN: number;
}

/**
 * Refuses a string that cannot be.
 *
 * @throws EngineInputError naming the quantity
 * @source common practice
 */
export function assertStringState(wire: StringState): void {
  assertNumber('massKgPerM', wire.massKgPerM, { above: 0 });
  assertNumber('tensionN', wire.tensionN, { above: 0 });
}

/**
 * Refuses a wave state that cannot be.
 *
 * @throws EngineInputError naming the quantity
 * @source common practice
 */
export function assertWaveState(wave: WaveState): void {
  assertStringState(wave);
  assertNumber('bendingStiffnessNm2', wave.bendingStiffnessNm2, { atLeast: 0 });
  assertNumber('frequencyHz', wave.frequencyHz, { above: 0 });
}
