import { noiseuxExponents } from './similarity-self-damping.ts';
import type { SelfDampingLaw, SelfDampingWire } from './self-damping-law.ts';

/** @source from memory: range of the laboratory conductors behind the exponents */
const validity = {
  diameterLowerM: 0.018,
  diameterUpperM: 0.045,
  tensionLowerRatio: 0.15,
  tensionUpperRatio: 0.3,
} as const;

const mmPerM = 1000;
const nPerKn = 1000;
const wPerMw = 1e-3;
/** Room for rounding at the edges of the validity. */
const edgeRatio = 1e-9;

/** A power law, or the quantity that lies outside its validity. */
export type PowerLawSelfDamping =
  | { readonly outcome: 'valid'; readonly law: SelfDampingLaw }
  | {
      readonly outcome: 'out-of-range';
      readonly quantity: 'diameterM' | 'tensionRatio';
      readonly value: number;
      readonly lower: number;
      readonly upper: number;
    };

/**
 * Coefficient K = D/√(RTS·m) of the power law, D in mm, RTS in kN, m in kg/m.
 *
 * @param wire diameter, rated strength and mass, > 0
 * @returns K, scalar [number]; 1.5 to 2 for usual conductors
 * @source from memory: belongs to the exponents 2.44, 5.63, 2.76 only
 * @validity that of the power law
 * @accuracy rounding
 */
export function selfDampingCoefficient(wire: Omit<SelfDampingWire, 'tensionN'>): number {
  return (wire.diameterM * mmPerM) / Math.sqrt((wire.ratedStrengthN / nPerKn) * wire.massKgPerM);
}

/**
 * Self-damping by the power law P[mW/m] = K·(A/D)^2.44·f^5.63/T^2.76, T in kN.
 *
 * @param wire diameter, mass, rated strength and tension, > 0
 * @returns law of the wire, or what lies outside the validity: on thin wires the law exceeds critical damping
 * @source from memory: exponents named for Noiseux 1992, seen second-hand; that the unit is mW/m is our own argument
 * @validity diameter 18 to 45 mm, tension 15 to 30 % of rated strength
 * @accuracy laboratories differ by a factor of two
 */
export function powerLawSelfDamping(wire: SelfDampingWire): PowerLawSelfDamping {
  const tensionRatio = wire.tensionN / wire.ratedStrengthN;
  const { diameterLowerM, diameterUpperM, tensionLowerRatio, tensionUpperRatio } = validity;
  const isOutside = (value: number, lower: number, upper: number) =>
    value < lower * (1 - edgeRatio) || value > upper * (1 + edgeRatio);
  if (isOutside(wire.diameterM, diameterLowerM, diameterUpperM)) {
    const range = { value: wire.diameterM, lower: diameterLowerM, upper: diameterUpperM };
    return { outcome: 'out-of-range', quantity: 'diameterM', ...range };
  }
  if (isOutside(tensionRatio, tensionLowerRatio, tensionUpperRatio)) {
    const range = { value: tensionRatio, lower: tensionLowerRatio, upper: tensionUpperRatio };
    return { outcome: 'out-of-range', quantity: 'tensionRatio', ...range };
  }
  const { amplitude, frequency, tension } = noiseuxExponents;
  return {
    outcome: 'valid',
    law: {
      factor: (wPerMw * selfDampingCoefficient(wire)) / (wire.tensionN / nPerKn) ** tension,
      amplitudeExponentNumber: amplitude,
      frequencyExponentNumber: frequency,
    },
  };
}
