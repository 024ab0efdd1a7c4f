import { assertWaveState, type WaveState } from './wave-state.ts';

/**
 * Length of one loop (node to node) of a travelling wave on a tensioned, bending-stiff wire.
 *
 * @param wave.massKgPerM          m, scalar [kg/m], > 0
 * @param wave.tensionN            T, scalar [N], > 0
 * @param wave.bendingStiffnessNm2 EI, scalar [N·m²], ≥ 0; 0 gives the string
 * @param wave.frequencyHz         f, scalar [Hz], > 0
 * @returns loop length, scalar [m]
 * @throws EngineInputError if an input is not finite or outside the bounds above (a caller's bug)
 * @source closed form: root k² of EI·k⁴ + T·k² = m·ω², loop = π/k; derived, see tests/reference/aeolian
 * @validity small slopes, constant tension, away from clamps (no evanescent part)
 * @accuracy exact for the stated equation; this form loses no digits as EI → 0
 */
export function loopLength(wave: WaveState): number {
  assertWaveState(wave);
  const { massKgPerM: m, tensionN: T, bendingStiffnessNm2: EI, frequencyHz: f } = wave;
  const stiffnessRatio = (4 * EI * m * (2 * Math.PI * f) ** 2) / T ** 2;
  // Conjugate form: the textbook root subtracts two nearly equal numbers when EI is small.
  return (Math.sqrt(T / m) / (2 * f)) * Math.sqrt((1 + Math.sqrt(1 + stiffnessRatio)) / 2);
}
