/** Wire and tension as the self-damping laws need them. */
export interface SelfDampingWire {
  readonly diameterM: number;
  readonly massKgPerM: number;
  readonly ratedStrengthN: number;
  readonly tensionN: number;
}

/**
 * A self-damping law for one wire at one tension: P = factor·f^frequencyExponent·(A/D)^amplitudeExponent per metre.
 * Every law we know is a product of powers, which is what lets the balance be solved in closed steps.
 */
export interface SelfDampingLaw {
  readonly factor: number;
  readonly amplitudeExponentNumber: number;
  readonly frequencyExponentNumber: number;
}

/**
 * Self-damping power per metre at one frequency and amplitude.
 *
 * @param law            law of the wire
 * @param at.frequencyHz f, scalar [Hz], > 0
 * @param at.xRatio      A/D, scalar [ratio], ≥ 0, zero to peak at the antinode
 * @returns power, scalar [W/m]
 * @source that of the law
 * @validity that of the law
 * @accuracy that of the law
 */
export function selfDampingPower(
  law: SelfDampingLaw,
  at: { readonly frequencyHz: number; readonly xRatio: number },
): number {
  return law.factor * at.frequencyHz ** law.frequencyExponentNumber * at.xRatio ** law.amplitudeExponentNumber;
}

/**
 * Ratio to critical damping that a self-damping power means, ζ = P/(½mω³A²).
 *
 * @param powerWPerM P, scalar [W/m]
 * @param at.massKgPerM m, at.frequencyHz f, at.amplitudeM A zero to peak, scalars, > 0
 * @returns ζ, scalar [ratio]
 * @source closed form: P = ½ζmω³A² of a standing wave
 * @validity ζ ≪ 1
 * @accuracy exact for the definition
 */
export function selfDampingRatio(
  powerWPerM: number,
  at: { readonly massKgPerM: number; readonly frequencyHz: number; readonly amplitudeM: number },
): number {
  return powerWPerM / (0.5 * at.massKgPerM * (2 * Math.PI * at.frequencyHz) ** 3 * at.amplitudeM ** 2);
}
