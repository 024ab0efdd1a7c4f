import { assertWaveState, type WaveState } from './wave-state.ts';
import { waveTable } from './wave-table.ts';

/** Travelling wave on a tensioned beam. */
export interface WaveDispersion {
  readonly waveNumberRadPerM: number;
  readonly decayNumberPerM: number;
  readonly phaseSpeedMPerS: number;
  readonly groupSpeedMPerS: number;
  readonly impedanceNsPerM: number;
}

/**
 * Wave number, speeds and impedance of a travelling wave on a tensioned beam.
 *
 * @param wave m, T, EI ≥ 0 and f, see WaveState
 * @returns k and κ [rad/m, 1/m], phase and group speed [m/s], Z = m·c_g [N·s/m]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form, see waveTable
 * @validity small slopes, constant tension
 * @accuracy exact for the stated equation
 */
export function waveDispersion(wave: WaveState): WaveDispersion {
  assertWaveState(wave);
  const table = waveTable(wave, Float64Array.of(wave.frequencyHz));
  const waveNumberRadPerM = table.waveNumbersRadPerM[0] as number;
  const impedanceNsPerM = table.impedancesNsPerM[0] as number;
  return {
    waveNumberRadPerM,
    decayNumberPerM: table.decayNumbersPerM[0] as number,
    phaseSpeedMPerS: (2 * Math.PI * wave.frequencyHz) / waveNumberRadPerM,
    groupSpeedMPerS: impedanceNsPerM / wave.massKgPerM,
    impedanceNsPerM,
  };
}

/**
 * Frequency of a wave number on a tensioned beam, ω² = (Tk² + EIk⁴)/m.
 *
 * @param wire m [kg/m] > 0, T [N] > 0, EI [N·m²] ≥ 0
 * @param waveNumberRadPerM k, scalar [rad/m], > 0
 * @returns f, scalar [Hz]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form: equation of motion
 * @validity small slopes, constant tension
 * @accuracy exact for the stated equation
 */
export function waveFrequency(wire: Omit<WaveState, 'frequencyHz'>, waveNumberRadPerM: number): number {
  assertWaveState({ ...wire, frequencyHz: waveNumberRadPerM });
  const k2 = waveNumberRadPerM ** 2;
  return Math.sqrt((k2 * (wire.tensionN + wire.bendingStiffnessNm2 * k2)) / wire.massKgPerM) / (2 * Math.PI);
}
