import { assertDamperModel } from '../dampers/assert-damper-model.ts';
import { damperImpedance } from '../dampers/damper-impedance.ts';
import type { DamperModel } from '../dampers/damper-model.ts';
import { damperNaturalFrequencies } from '../dampers/damper-natural-frequencies.ts';
import { methodEntry, methodNote } from '../methods/method-registry.ts';
import type { Complex } from '../numerics/complex.ts';
import { commandHead, type CommandHead } from './command-head.ts';
import { checkedFrequencies } from './waves-command.ts';

/** Input of `damper`. */
export interface DamperInput {
  readonly model: DamperModel;
  readonly frequenciesHz: readonly number[];
}

/** Impedance at one frequency; null outside a table. */
export interface DamperRow {
  readonly frequencyHz: number;
  readonly impedance: Complex | null;
}

/**
 * Driving-point impedance of a damper, and the natural frequencies of its halves.
 *
 * @param input model and frequencies [n]
 * @returns rows [n] in the order of the frequencies; natural frequencies per half, null for a table
 * @throws EngineInputError naming the field
 * @source closed form for halves, see halfDamperImpedance; the measurement for a table
 * @validity that of the model; velocity tables at the middle of their velocities
 * @accuracy that of the model
 */
export function damperCommand(
  input: DamperInput,
): CommandHead & { naturalFrequenciesHz: number[][] | null; rows: DamperRow[] } {
  const { model } = input;
  assertDamperModel(model, 'model');
  const frequenciesHz = checkedFrequencies(input.frequenciesHz);
  const angularFrequenciesRadPerS = frequenciesHz.map((f) => 2 * Math.PI * f);
  const series = damperImpedance(model, { frequenciesHz, angularFrequenciesRadPerS });
  const rows = Array.from(frequenciesHz, (frequencyHz, index): DamperRow => {
    const re = series.re[index] as number;
    return { frequencyHz, impedance: Number.isNaN(re) ? null : { re, im: series.im[index] as number } };
  });
  const isHalves = model.kind === 'halves';
  const note = methodNote(methodEntry('fixed', `damper-${model.kind}`));
  return {
    ...commandHead([note]),
    naturalFrequenciesHz: isHalves ? model.halves.map(damperNaturalFrequencies) : null,
    rows,
  };
}
