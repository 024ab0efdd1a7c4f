import { assertNumber } from '../numerics/assert-number.ts';
import { assertStringState, type StringState } from './wave-state.ts';

/** Motion of one frequency; amplitude zero to peak, of the travelling wave or at the antinode as stated. */
export interface WaveMotion {
  readonly frequencyHz: number;
  readonly amplitudeM: number;
}

/** Mean energies of a travelling wave per metre of wire. */
export interface TravellingWaveEnergy {
  readonly kineticJPerM: number;
  readonly potentialJPerM: number;
}

function assertMotion({ frequencyHz, amplitudeM }: WaveMotion): void {
  assertNumber('frequencyHz', frequencyHz, { above: 0 });
  assertNumber('amplitudeM', amplitudeM, { atLeast: 0 });
}

/**
 * Mean kinetic and potential energy per metre of a travelling wave, ¼mω²A² and ¼Tk²A², which are equal.
 *
 * @param wire   m [kg/m] and T [N], scalars, > 0
 * @param motion f [Hz] > 0 and A of the wave, zero to peak [m], ≥ 0
 * @returns energies, scalars [J/m]
 * @throws EngineInputError if an input is outside the bounds above
 * @source closed form: mean of ½mψ_t² and ½Tψ_x²
 * @validity string, small slopes
 * @accuracy exact
 */
export function travellingWaveEnergy(wire: StringState, motion: WaveMotion): TravellingWaveEnergy {
  assertStringState(wire);
  assertMotion(motion);
  const w = 2 * Math.PI * motion.frequencyHz;
  const k = w / Math.sqrt(wire.tensionN / wire.massKgPerM);
  return {
    kineticJPerM: (wire.massKgPerM * (w * motion.amplitudeM) ** 2) / 4,
    potentialJPerM: (wire.tensionN * (k * motion.amplitudeM) ** 2) / 4,
  };
}

/**
 * Energy per metre of a standing wave, ¼mω²A².
 *
 * @param wire   m [kg/m] and T [N], scalars, > 0
 * @param motion f [Hz] > 0 and A at the antinode, zero to peak [m], ≥ 0
 * @returns energy, scalar [J/m]
 * @throws EngineInputError if an input is outside the bounds above
 * @source closed form: two travelling waves of half the amplitude
 * @validity string, small slopes; mean over a loop
 * @accuracy exact
 */
export function standingWaveEnergy(wire: StringState, motion: WaveMotion): number {
  return 4 * travellingWaveEnergy(wire, { ...motion, amplitudeM: motion.amplitudeM / 2 }).kineticJPerM;
}

/**
 * Mean power that a travelling wave carries, ½Z₀ω²A².
 *
 * @param wire   m [kg/m] and T [N], scalars, > 0
 * @param motion f [Hz] > 0 and A of the wave, zero to peak [m], ≥ 0
 * @returns power, scalar [W]
 * @throws EngineInputError if an input is outside the bounds above
 * @source closed form: mean of −Tψ_xψ_t
 * @validity string, small slopes
 * @accuracy exact
 */
export function travellingWavePower(wire: StringState, motion: WaveMotion): number {
  const { kineticJPerM, potentialJPerM } = travellingWaveEnergy(wire, motion);
  return (kineticJPerM + potentialJPerM) * Math.sqrt(wire.tensionN / wire.massKgPerM);
}

/**
 * Power crossing a point at one instant, −Tψ_xψ_t, positive towards +x.
 *
 * @param wire             m [kg/m] and T [N], scalars, > 0
 * @param motion           f [Hz] > 0 and A of the wave, zero to peak [m], ≥ 0
 * @param at.phaseRad      phase of ψ = A·cos(phase), scalar [rad]
 * @param at.isTowardsPlusX direction in which the wave travels
 * @returns power, scalar [W]
 * @throws EngineInputError if an input is outside the bounds above
 * @source closed form: ±Z₀ψ_t²
 * @validity string, small slopes
 * @accuracy exact
 */
export function instantaneousWavePower(
  wire: StringState,
  motion: WaveMotion,
  at: { readonly phaseRad: number; readonly isTowardsPlusX: boolean },
): number {
  assertNumber('phaseRad', at.phaseRad);
  const size = 2 * travellingWavePower(wire, motion) * Math.sin(at.phaseRad) ** 2;
  return at.isTowardsPlusX ? size : -size;
}
