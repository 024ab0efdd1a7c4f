import type { ImpedanceSeries } from '../ends/clamp-response.ts';
import { assertNumber } from '../numerics/assert-number.ts';
import { EngineInputError } from '../numerics/engine-input-error.ts';
import type { VelocityTablesDamperModel } from './damper-model.ts';
import { impedanceTable, tableImpedance } from './impedance-table.ts';

const tableLimitCount = 12;
const velocityLimits = { above: 0, atMost: 5 } as const;

/**
 * Refuses impedance tables over clamp velocity that cannot be.
 *
 * @param model tables [2–12] at rising clamp velocities
 * @param path  name of the model in the caller's input
 * @throws EngineInputError naming the table and row
 * @source common practice
 */
export function assertVelocityTables(model: VelocityTablesDamperModel, path: string): void {
  if (model.tables.length < 2 || model.tables.length > tableLimitCount) {
    throw new EngineInputError(`${path}.tables`, `must be 2 to ${tableLimitCount} tables`);
  }
  model.tables.forEach((table, index) => {
    const here = `${path}.tables[${index}]`;
    assertNumber(`${here}.clampVelocityMPerS`, table.clampVelocityMPerS, velocityLimits);
    const before = model.tables[index - 1]?.clampVelocityMPerS ?? 0;
    if (table.clampVelocityMPerS <= before) {
      throw new EngineInputError(`${here}.clampVelocityMPerS`, `must be above the table before, ${before} m/s`);
    }
    impedanceTable({ kind: 'table', rows: table.rows }, here);
  });
}

/** Geometric middle of the clamp velocities of the tables: where an iteration starts. */
export function middleVelocity(model: VelocityTablesDamperModel): number {
  const lowest = model.tables[0]?.clampVelocityMPerS ?? 1;
  return Math.sqrt(lowest * (model.tables.at(-1)?.clampVelocityMPerS ?? lowest));
}

/**
 * Impedance between tables at several clamp velocities: straight lines against ln v on both parts.
 *
 * @param model          checked tables
 * @param frequenciesHz  f, [n] [Hz]
 * @param velocitiesMPerS clamp velocity at each frequency, zero to peak, [n] [m/s], > 0
 * @returns real and imaginary parts [n] [N·s/m]; not a number where one of the tables used has no data
 * @source common practice
 * @validity between the lowest and the highest velocity; beyond them the nearest table is held
 * @accuracy that of the tables
 */
export function velocityImpedance(
  model: VelocityTablesDamperModel,
  frequenciesHz: Float64Array,
  velocitiesMPerS: Float64Array,
): ImpedanceSeries {
  const series = model.tables.map(({ rows }) =>
    tableImpedance(impedanceTable({ kind: 'table', rows }, 'model'), frequenciesHz),
  );
  const logs = model.tables.map(({ clampVelocityMPerS }) => Math.log(clampVelocityMPerS));
  const out = { re: new Float64Array(frequenciesHz.length), im: new Float64Array(frequenciesHz.length) };
  for (let index = 0; index < frequenciesHz.length; index += 1) {
    const log = Math.log(Math.max(velocitiesMPerS[index] as number, Number.MIN_VALUE));
    let upper = 1;
    while (upper < logs.length - 1 && log > (logs[upper] as number)) upper += 1;
    const from = logs[upper - 1] as number;
    const share = Math.min(Math.max((log - from) / ((logs[upper] as number) - from), 0), 1);
    const [a, b] = [series[upper - 1], series[upper]];
    // A table that has no part in the value need not have data there.
    const mix = (low: number, high: number) => (share === 0 ? low : share === 1 ? high : low + share * (high - low));
    out.re[index] = mix(a?.re[index] ?? NaN, b?.re[index] ?? NaN);
    out.im[index] = mix(a?.im[index] ?? NaN, b?.im[index] ?? NaN);
  }
  return out;
}
