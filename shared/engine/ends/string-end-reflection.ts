import { assertNumber } from '../numerics/assert-number.ts';
import type { Complex } from '../numerics/complex.ts';
import { stringImpedance, stringWaveSpeed } from '../waves/string-wave.ts';
import type { StringState } from '../waves/wave-state.ts';

/** One damper on a string beside a fixed clamp. */
export interface StringDamper {
  readonly frequencyHz: number;
  readonly distanceM: number;
  readonly impedance: Complex;
}

/**
 * Reflection of a string at a damper beside a fixed clamp, referred to the damper.
 *
 * R = (Z₀ − Z_t)/(Z₀ + Z_t), Z_t = Z_d − jZ₀·cot(ks), multiplied through by sin ks, where the cotangent has its poles.
 *
 * @param wire   m [kg/m] and T [N], scalars, > 0
 * @param damper f [Hz] > 0, distance s [m] > 0, impedance Z_d [N·s/m]
 * @returns R, complex
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form
 * @validity string, point damper, fixed clamp; the limit of the beam as EI → 0
 * @accuracy rounding
 */
export function stringEndReflection(wire: StringState, damper: StringDamper): Complex {
  assertNumber('frequencyHz', damper.frequencyHz, { above: 0 });
  assertNumber('distanceM', damper.distanceM, { above: 0 });
  const Z0 = stringImpedance(wire);
  const ks = (2 * Math.PI * damper.frequencyHz * damper.distanceM) / stringWaveSpeed(wire);
  const s = Math.sin(ks);
  const c = Math.cos(ks);
  const { re, im } = damper.impedance;
  const up = { re: (Z0 - re) * s, im: Z0 * c - im * s };
  const down = { re: (Z0 + re) * s, im: im * s - Z0 * c };
  const size = down.re ** 2 + down.im ** 2;
  return {
    re: (up.re * down.re + up.im * down.im) / size,
    im: (up.im * down.re - up.re * down.im) / size,
  };
}
