import { nodePower } from '../ends/standing-wave-ratio.ts';
import { assertNumber } from '../numerics/assert-number.ts';
import { stringImpedance, stringWaveSpeed } from '../waves/string-wave.ts';
import type { StringState } from '../waves/wave-state.ts';

/** Two nodes of a driven laboratory span; amplitudes zero to peak. */
export interface NodePair {
  readonly frequencyHz: number;
  readonly antinodeAmplitudeM: number;
  /** Node nearer the shaker. */
  readonly nearNodeAmplitudeM: number;
  readonly farNodeAmplitudeM: number;
  readonly loopCount: number;
}

/**
 * Self-damping per metre from the motion of two nodes, by the difference of the powers through them.
 *
 * @param wire m [kg/m] and T [N], scalars, > 0
 * @param pair f [Hz], antinode and node amplitudes [m], loops between the nodes ≥ 1
 * @returns power, scalar [W/m]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form: ½Z₀ω²A(a₁ − a₂)/(n·c/2f), the inverse standing wave ratio method
 * @validity small losses per loop, nodes measured where bending stiffness matters little
 * @accuracy that of the node amplitudes
 */
export function nodePairSelfDamping(wire: StringState, pair: NodePair): number {
  assertNumber('loopCount', pair.loopCount, { atLeast: 1 });
  const motion = { frequencyHz: pair.frequencyHz, antinodeAmplitudeM: pair.antinodeAmplitudeM };
  const impedance = stringImpedance(wire);
  const near = nodePower(impedance, { ...motion, nodeAmplitudeM: pair.nearNodeAmplitudeM });
  const far = nodePower(impedance, { ...motion, nodeAmplitudeM: pair.farNodeAmplitudeM });
  return (near - far) / ((pair.loopCount * stringWaveSpeed(wire)) / (2 * pair.frequencyHz));
}

/**
 * Damping power per metre of a standing wave for a share of critical damping, ½ζmω³A².
 *
 * @param dampingRatio ζ, scalar [ratio], ≥ 0
 * @param at.massKgPerM m, at.frequencyHz f, at.amplitudeM A at the antinode zero to peak
 * @returns power, scalar [W/m]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form: 4πζ of the energy per cycle
 * @validity ζ ≪ 1
 * @accuracy first order in ζ
 */
export function dampingPower(
  dampingRatio: number,
  at: { readonly massKgPerM: number; readonly frequencyHz: number; readonly amplitudeM: number },
): number {
  assertNumber('dampingRatio', dampingRatio, { atLeast: 0 });
  assertNumber('massKgPerM', at.massKgPerM, { above: 0 });
  assertNumber('frequencyHz', at.frequencyHz, { above: 0 });
  assertNumber('amplitudeM', at.amplitudeM, { atLeast: 0 });
  return 0.5 * dampingRatio * at.massKgPerM * (2 * Math.PI * at.frequencyHz) ** 3 * at.amplitudeM ** 2;
}

/**
 * Ratio to critical damping from the decay of a loop, δ = ln(A₀/A_n)/n, ζ = δ/√(4π² + δ²).
 *
 * @param decay.startAmplitudeM A₀, decay.endAmplitudeM A_n, scalars [m], A₀ ≥ A_n > 0
 * @param decay.cycleCount n, scalar, > 0
 * @returns ζ, scalar [ratio]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form: logarithmic decrement
 * @validity damping constant over the decay
 * @accuracy exact for the definition
 */
export function decayDampingRatio(decay: {
  readonly startAmplitudeM: number;
  readonly endAmplitudeM: number;
  readonly cycleCount: number;
}): number {
  assertNumber('endAmplitudeM', decay.endAmplitudeM, { above: 0 });
  assertNumber('startAmplitudeM', decay.startAmplitudeM, { atLeast: decay.endAmplitudeM });
  assertNumber('cycleCount', decay.cycleCount, { above: 0 });
  const decrement = Math.log(decay.startAmplitudeM / decay.endAmplitudeM) / decay.cycleCount;
  return decrement / Math.sqrt(4 * Math.PI ** 2 + decrement ** 2);
}

/**
 * Distance over which a travelling wave falls to 1/e of its amplitude, c/(ζω).
 *
 * @param wire         m [kg/m] and T [N], scalars, > 0
 * @param dampingRatio ζ, scalar [ratio], > 0
 * @param frequencyHz  f, scalar [Hz], > 0
 * @returns distance, scalar [m]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form
 * @validity ζ ≪ 1, string
 * @accuracy first order in ζ
 */
export function attenuationLength(wire: StringState, dampingRatio: number, frequencyHz: number): number {
  assertNumber('dampingRatio', dampingRatio, { above: 0 });
  assertNumber('frequencyHz', frequencyHz, { above: 0 });
  return stringWaveSpeed(wire) / (dampingRatio * 2 * Math.PI * frequencyHz);
}
