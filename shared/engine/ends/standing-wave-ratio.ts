import { assertNumber } from '../numerics/assert-number.ts';
import { EngineInputError } from '../numerics/engine-input-error.ts';

function assertRatio(path: string, value: number): void {
  assertNumber(path, value, { atLeast: 0, atMost: 1 });
}

/**
 * Standing wave ratio, antinode over node amplitude, (1 + |R|)/(1 − |R|).
 *
 * @param reflectionRatio |R|, scalar [ratio], 0 to below 1
 * @returns ratio, scalar [number]
 * @throws EngineInputError if |R| is outside its bounds: at 1 the node is still
 * @source closed form
 * @validity small losses within a loop
 * @accuracy exact
 */
export function standingWaveRatio(reflectionRatio: number): number {
  assertRatio('reflectionRatio', reflectionRatio);
  if (reflectionRatio === 1) throw new EngineInputError('reflectionRatio', 'must be below 1');
  return (1 + reflectionRatio) / (1 - reflectionRatio);
}

/**
 * Inverse standing wave ratio, node over antinode amplitude, S = (1 − |R|)/(1 + |R|).
 *
 * @param reflectionRatio |R|, scalar [ratio], 0 to 1
 * @returns S, scalar [ratio]
 * @throws EngineInputError if |R| is outside its bounds
 * @source closed form
 * @validity small losses within a loop
 * @accuracy exact
 */
export function inverseStandingWaveRatio(reflectionRatio: number): number {
  assertRatio('reflectionRatio', reflectionRatio);
  return (1 - reflectionRatio) / (1 + reflectionRatio);
}

/**
 * Share of the arriving power that an end of a given inverse standing wave ratio absorbs, 4S/(1 + S)².
 *
 * @param iswRatio S, scalar [ratio], 0 to 1; the trade's damper efficiency is S, not this share
 * @returns share, scalar [ratio]
 * @throws EngineInputError if S is outside its bounds
 * @source closed form: 1 − |R|²
 * @validity small losses within a loop
 * @accuracy exact
 */
export function absorbedShare(iswRatio: number): number {
  assertRatio('iswRatio', iswRatio);
  return (4 * iswRatio) / (1 + iswRatio) ** 2;
}

/** Amplitudes of a standing wave with losses, zero to peak. */
export interface NodeMotion {
  readonly frequencyHz: number;
  readonly antinodeAmplitudeM: number;
  readonly nodeAmplitudeM: number;
}

/**
 * Net power through a section from node and antinode amplitudes, ½Z₀ω²A_antinode·A_node.
 *
 * @param impedanceNsPerM Z₀, scalar [N·s/m], > 0
 * @param motion          f [Hz] > 0 and amplitudes zero to peak [m], ≥ 0
 * @returns power, scalar [W]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form
 * @validity nodes measured where bending stiffness matters little
 * @accuracy exact
 */
export function nodePower(impedanceNsPerM: number, motion: NodeMotion): number {
  assertNumber('impedanceNsPerM', impedanceNsPerM, { above: 0 });
  assertNumber('frequencyHz', motion.frequencyHz, { above: 0 });
  assertNumber('antinodeAmplitudeM', motion.antinodeAmplitudeM, { atLeast: 0 });
  assertNumber('nodeAmplitudeM', motion.nodeAmplitudeM, { atLeast: 0 });
  const w = 2 * Math.PI * motion.frequencyHz;
  return 0.5 * impedanceNsPerM * w * w * motion.antinodeAmplitudeM * motion.nodeAmplitudeM;
}
