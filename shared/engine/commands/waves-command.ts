import { methodEntry, methodNote } from '../methods/method-registry.ts';
import { assertNumber } from '../numerics/assert-number.ts';
import { assertTension } from '../span/wire-properties.ts';
import { loopLength } from '../waves/loop-length.ts';
import { waveTable } from '../waves/wave-table.ts';
import { commandHead, type CommandHead } from './command-head.ts';

/** Input of `waves`. */
export interface WavesInput {
  readonly wire: {
    readonly massKgPerM: number;
    readonly bendingStiffnessMinNm2: number;
    readonly ratedStrengthN?: number | undefined;
  };
  readonly span: { readonly tensionN: number };
  readonly frequenciesHz: readonly number[];
}

/** Travelling wave at one frequency. */
export interface WaveRow {
  readonly frequencyHz: number;
  readonly phaseSpeedMPerS: number;
  readonly groupSpeedMPerS: number;
  readonly impedanceNsPerM: number;
  readonly wavelengthM: number;
  readonly loopLengthM: number;
}

const massLimits = { above: 0, atMost: 50 } as const;
const stiffnessLimits = { atLeast: 0, atMost: 1e6 } as const;
/** @source common practice: above any sound that a wire makes */
const frequencyLimits = { above: 0, atMost: 1000 } as const;

/** Checks a list of frequencies and copies it for the inner loops. */
export function checkedFrequencies(frequenciesHz: readonly number[]): Float64Array {
  frequenciesHz.forEach((f, index) => assertNumber(`frequenciesHz[${index}]`, f, frequencyLimits));
  return Float64Array.from(frequenciesHz);
}

/**
 * Speeds, impedance and lengths of travelling waves on a tensioned beam.
 *
 * @param input mass, stiffness (0 gives the string), tension and frequencies [n]
 * @returns rows [n] in the order of the frequencies
 * @throws EngineInputError naming the field
 * @source closed form, see waveTable
 * @validity small slopes, constant tension
 * @accuracy rounding
 */
export function wavesCommand(input: WavesInput): CommandHead & { rows: WaveRow[] } {
  const { massKgPerM, bendingStiffnessMinNm2, ratedStrengthN } = input.wire;
  const { tensionN } = input.span;
  assertNumber('wire.massKgPerM', massKgPerM, massLimits);
  assertNumber('wire.bendingStiffnessMinNm2', bendingStiffnessMinNm2, stiffnessLimits);
  assertTension(tensionN, { path: 'span.tensionN', ratedStrengthN: ratedStrengthN ?? Infinity });
  const wire = { massKgPerM, tensionN, bendingStiffnessNm2: bendingStiffnessMinNm2 };
  const table = waveTable(wire, checkedFrequencies(input.frequenciesHz));
  const rows = Array.from(table.frequenciesHz, (frequencyHz, index): WaveRow => {
    const loopLengthM = loopLength({ ...wire, frequencyHz });
    const impedanceNsPerM = table.impedancesNsPerM[index] as number;
    return {
      frequencyHz,
      phaseSpeedMPerS: 2 * loopLengthM * frequencyHz,
      groupSpeedMPerS: impedanceNsPerM / massKgPerM,
      impedanceNsPerM,
      wavelengthM: 2 * loopLengthM,
      loopLengthM,
    };
  });
  return { ...commandHead([methodNote(methodEntry('fixed', 'waves-tensioned-beam'))]), rows };
}
