import type { SelfDampingLaw, SelfDampingWire } from './self-damping-law.ts';

/** Exponents of amplitude, frequency and tension. @source from memory: Noiseux 1992, the same three seen second-hand */
export const noiseuxExponents = { amplitude: 2.44, frequency: 5.63, tension: 2.76 } as const;

/** Level at the reference point below. @source own model: calibrated on the recalled terrain limits of safe design tension */
const levelRatio = 6.5e-4;
/** @source own model: a usual amplitude, and the product of frequency and diameter and the wave speed of a usual wire */
const reference = { xRatio: 0.1, frequencyDiameterMPerS: 0.6, waveSpeedMPerS: 130 } as const;

/**
 * Self-damping by similarity: P = ½mω³A²ζ, ζ = 6.5e−4·(x/0.1)^(l−2)·(fD/0.6 m/s)^(m′−3)·(c/130 m/s)^(−2n).
 *
 * @param wire diameter, mass and tension, > 0
 * @returns law of the wire
 * @source own model: own scaling of recalled exponents (2.44, 5.63, 2.76); level calibrated, see the consistency test
 * @validity stranded conductors; ζ below about 0.02. With the ratio of strand to wire diameter fixed, stress, A/D and
 *   f·D are the same for every size of wire at the same H/w
 * @accuracy the level is the largest doubt of the whole result: laboratories differ by a factor of two
 */
export function similaritySelfDamping(wire: SelfDampingWire): SelfDampingLaw {
  const { diameterM: D, massKgPerM: m, tensionN: T } = wire;
  const { amplitude: l, frequency: mf, tension: n } = noiseuxExponents;
  const waveSpeed = Math.sqrt(T / m);
  const ratioAtUnitFrequency =
    levelRatio *
    reference.xRatio ** (2 - l) *
    (D / reference.frequencyDiameterMPerS) ** (mf - 3) *
    (waveSpeed / reference.waveSpeedMPerS) ** (-2 * n);
  return {
    factor: 0.5 * m * (2 * Math.PI) ** 3 * D ** 2 * ratioAtUnitFrequency,
    amplitudeExponentNumber: l,
    frequencyExponentNumber: mf,
  };
}
