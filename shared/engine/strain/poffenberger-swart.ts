import { assertNumber } from '../numerics/assert-number.ts';

/** Wire at a clamp as the bending amplitude method needs it. */
export interface ClampWire {
  readonly tensionN: number;
  readonly bendingStiffnessNm2: number;
  readonly outerStrandDiameterM: number;
}

/** Distance of the measuring point from the last point of contact, 3.5 in. @source common practice */
export const bendingAmplitudeDistanceM = 0.089;

/** p and exp(−px) − 1 + px of the clamped, tensioned beam. */
function clampShape(wire: ClampWire, distanceM: number): { p: number; lift: number } {
  assertNumber('tensionN', wire.tensionN, { above: 0 });
  assertNumber('bendingStiffnessNm2', wire.bendingStiffnessNm2, { above: 0 });
  assertNumber('outerStrandDiameterM', wire.outerStrandDiameterM, { above: 0 });
  assertNumber('distanceM', distanceM, { above: 0 });
  const p = Math.sqrt(wire.tensionN / wire.bendingStiffnessNm2);
  const px = p * distanceM;
  return { p, lift: Math.expm1(-px) + px };
}

/**
 * Bending strain of the outer strand at a clamp per peak-to-peak bending amplitude, d·p²/[4(e^−px − 1 + px)].
 *
 * @param wire      T [N], EI [N·m²] (EImin by convention), outer strand diameter d [m], scalars, > 0
 * @param distanceM x, scalar [m], > 0; 0.089 by convention
 * @returns strain zero to peak per metre of bending amplitude peak to peak, scalar [1/m]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form on a formula from memory: Poffenberger and Swart, Differential displacement and dynamic conductor
 *   strain, IEEE Trans. PAS-84 (1965), not read. With an amplitude zero to peak the 4 becomes 2
 * @validity rigid clamp; doubtful for compact conductors
 * @accuracy with EImax instead of EImin about 40 % less: always say which
 */
export function bendingAmplitudeStrainRate(wire: ClampWire, distanceM: number = bendingAmplitudeDistanceM): number {
  const { p, lift } = clampShape(wire, distanceM);
  return (wire.outerStrandDiameterM * p * p) / (4 * lift);
}

/**
 * Bending strain at a clamp from a recorded bending amplitude.
 *
 * @param wire                 T, EI, d, see bendingAmplitudeStrainRate
 * @param bendingAmplitudePkPkM Yb, scalar [m], peak to peak, ≥ 0
 * @param distanceM            x, scalar [m]
 * @returns strain zero to peak, scalar [ratio]; stress is the strand's modulus times it
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form on a formula from memory, see bendingAmplitudeStrainRate
 * @validity rigid clamp
 * @accuracy see bendingAmplitudeStrainRate
 */
export function strainOfBendingAmplitude(
  wire: ClampWire,
  bendingAmplitudePkPkM: number,
  distanceM: number = bendingAmplitudeDistanceM,
): number {
  assertNumber('bendingAmplitudePkPkM', bendingAmplitudePkPkM, { atLeast: 0 });
  return bendingAmplitudePkPkM * bendingAmplitudeStrainRate(wire, distanceM);
}

/**
 * Bending amplitude that goes with a bending strain at a clamp.
 *
 * @param wire        T, EI, d, see bendingAmplitudeStrainRate
 * @param strainRatio ε, scalar [ratio], zero to peak, ≥ 0
 * @param distanceM   x, scalar [m]
 * @returns Yb, scalar [m], peak to peak
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form on a formula from memory, see bendingAmplitudeStrainRate
 * @validity rigid clamp
 * @accuracy see bendingAmplitudeStrainRate
 */
export function bendingAmplitudeOfStrain(
  wire: ClampWire,
  strainRatio: number,
  distanceM: number = bendingAmplitudeDistanceM,
): number {
  assertNumber('strainRatio', strainRatio, { atLeast: 0 });
  return strainRatio / bendingAmplitudeStrainRate(wire, distanceM);
}

/**
 * Bending amplitude beside a fixed clamp for an antinode amplitude, (2ωA√(m/EI)/p²)(e^−px − 1 + px).
 *
 * @param wire         T, EI, d, see bendingAmplitudeStrainRate
 * @param motion.massKgPerM m, motion.frequencyHz f, motion.amplitudeM A at the antinode zero to peak
 * @param distanceM    x, scalar [m]
 * @returns Yb, scalar [m], peak to peak
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form: curvature ω√(m/EI)·A at the clamp, which decays as e^−px
 * @validity fixed end, decay length short against the loop
 * @accuracy of order (k/κ)²
 */
export function bendingAmplitudeOfAntinode(
  wire: ClampWire,
  motion: { readonly massKgPerM: number; readonly frequencyHz: number; readonly amplitudeM: number },
  distanceM: number = bendingAmplitudeDistanceM,
): number {
  assertNumber('massKgPerM', motion.massKgPerM, { above: 0 });
  assertNumber('frequencyHz', motion.frequencyHz, { above: 0 });
  assertNumber('amplitudeM', motion.amplitudeM, { atLeast: 0 });
  const { p, lift } = clampShape(wire, distanceM);
  const curvature =
    2 * Math.PI * motion.frequencyHz * motion.amplitudeM * Math.sqrt(motion.massKgPerM / wire.bendingStiffnessNm2);
  return (2 * curvature * lift) / (p * p);
}
