import { assertNumber } from '../numerics/assert-number.ts';

/** What a step in impedance does to a wave that arrives from its first side; displacement amplitudes. */
export interface ImpedanceStep {
  readonly reflectedRatio: number;
  readonly transmittedRatio: number;
  readonly reflectedPowerRatio: number;
  readonly transmittedPowerRatio: number;
}

/**
 * Reflection and transmission of displacement at a step in wave impedance.
 *
 * @param firstNsPerM  Z₁ on the side the wave comes from, scalar [N·s/m], > 0
 * @param secondNsPerM Z₂ beyond, scalar [N·s/m], ≥ 0
 * @returns R = (Z₁ − Z₂)/(Z₁ + Z₂), 1 + R, R², 1 − R²
 * @throws EngineInputError if an input is outside the bounds above
 * @source closed form: displacement and force continuous. For force or slope waves the sign of R turns
 * @validity string, equal tension on both sides
 * @accuracy exact
 */
export function impedanceStep(firstNsPerM: number, secondNsPerM: number): ImpedanceStep {
  assertNumber('firstNsPerM', firstNsPerM, { above: 0 });
  assertNumber('secondNsPerM', secondNsPerM, { atLeast: 0 });
  const sum = firstNsPerM + secondNsPerM;
  const reflectedRatio = (firstNsPerM - secondNsPerM) / sum;
  return {
    reflectedRatio,
    transmittedRatio: (2 * firstNsPerM) / sum,
    reflectedPowerRatio: reflectedRatio ** 2,
    transmittedPowerRatio: (4 * firstNsPerM * secondNsPerM) / sum ** 2,
  };
}

/**
 * Share of the arriving power that a lumped mass in mid-span reflects, a²/(1 + a²), a = ωM/2Z₀.
 *
 * @param massKg           M, scalar [kg], ≥ 0
 * @param at.frequencyHz   f, scalar [Hz], > 0
 * @param at.impedanceNsPerM Z₀, scalar [N·s/m], > 0
 * @returns share, scalar [ratio]
 * @throws EngineInputError if an input is outside the bounds above
 * @source closed form: R = −jωM/(2Z₀ + jωM)
 * @validity string, point mass: marker spheres, damper clamps
 * @accuracy exact
 */
export function lumpedMassReflection(
  massKg: number,
  at: { readonly frequencyHz: number; readonly impedanceNsPerM: number },
): number {
  assertNumber('massKg', massKg, { atLeast: 0 });
  assertNumber('frequencyHz', at.frequencyHz, { above: 0 });
  assertNumber('impedanceNsPerM', at.impedanceNsPerM, { above: 0 });
  const a = (2 * Math.PI * at.frequencyHz * massKg) / (2 * at.impedanceNsPerM);
  return a ** 2 / (1 + a ** 2);
}
