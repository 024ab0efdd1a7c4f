import { assertNumber } from '../numerics/assert-number.ts';
import { assertStringState, type StringState } from './wave-state.ts';

/**
 * Speed of transverse waves on a string, c = √(T/m).
 *
 * @param wire m [kg/m] and T [N], scalars, > 0
 * @returns c, scalar [m/s]
 * @throws EngineInputError if an input is outside the bounds above
 * @source closed form: wave equation of a stretched string
 * @validity bending stiffness without effect
 * @accuracy exact
 */
export function stringWaveSpeed(wire: StringState): number {
  assertStringState(wire);
  return Math.sqrt(wire.tensionN / wire.massKgPerM);
}

/**
 * Wave impedance of a string, Z₀ = √(T·m).
 *
 * @param wire m [kg/m] and T [N], scalars, > 0
 * @returns Z₀, scalar [N·s/m]
 * @throws EngineInputError if an input is outside the bounds above
 * @source closed form: force over velocity of a travelling wave
 * @validity bending stiffness without effect
 * @accuracy exact
 */
export function stringImpedance(wire: StringState): number {
  assertStringState(wire);
  return Math.sqrt(wire.tensionN * wire.massKgPerM);
}

/**
 * Natural frequency of a span as a string with n loops, f = n·c/2L.
 *
 * @param wire           m [kg/m] and T [N], scalars, > 0
 * @param span.lengthM   L, scalar [m], > 0
 * @param span.loopCount n, whole number ≥ 1
 * @returns f, scalar [Hz]
 * @throws EngineInputError if an input is outside the bounds above
 * @source closed form: standing waves between fixed ends
 * @validity bending stiffness without effect, both ends fixed
 * @accuracy exact
 */
export function spanNaturalFrequency(
  wire: StringState,
  span: { readonly lengthM: number; readonly loopCount: number },
): number {
  assertNumber('lengthM', span.lengthM, { above: 0 });
  assertNumber('loopCount', span.loopCount, { atLeast: 1 });
  return (span.loopCount * stringWaveSpeed(wire)) / (2 * span.lengthM);
}
