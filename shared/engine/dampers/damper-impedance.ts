import type { ImpedanceSeries } from '../ends/clamp-response.ts';
import type { WaveTable } from '../waves/wave-table.ts';
import type { DamperModel } from './damper-model.ts';
import { halfDamperImpedance } from './half-damper-impedance.ts';
import { impedanceTable, tableImpedance } from './impedance-table.ts';
import { middleVelocity, velocityImpedance } from './velocity-tables.ts';

/**
 * Driving-point impedance of a damper, force over velocity at its clamp.
 *
 * @param model checked damper
 * @param table frequencies, [n]
 * @param velocitiesMPerS clamp velocity at each frequency, [n] [m/s]; the middle of the tables' velocities when left out
 * @returns real and imaginary parts [n] [N·s/m]; not a number outside a measured table
 * @source closed form for halves; the maker's or the laboratory's measurement for tables
 * @validity that of the model
 * @accuracy that of the model
 */
export function damperImpedance(
  model: DamperModel,
  table: Pick<WaveTable, 'frequenciesHz' | 'angularFrequenciesRadPerS'>,
  velocitiesMPerS?: Float64Array,
): ImpedanceSeries {
  if (model.kind === 'halves') return halfDamperImpedance(model, table.angularFrequenciesRadPerS);
  if (model.kind === 'velocity-tables') {
    const velocities = velocitiesMPerS ?? new Float64Array(table.frequenciesHz.length).fill(middleVelocity(model));
    return velocityImpedance(model, table.frequenciesHz, velocities);
  }
  return tableImpedance(impedanceTable(model, 'model'), table.frequenciesHz);
}
