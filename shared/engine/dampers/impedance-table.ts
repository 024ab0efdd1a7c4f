import type { ImpedanceSeries } from '../ends/clamp-response.ts';
import { assertNumber } from '../numerics/assert-number.ts';
import { EngineInputError } from '../numerics/engine-input-error.ts';
import type { ImpedanceRow, TableDamperModel } from './damper-model.ts';

/** Impedance table in the form the interpolation needs. */
export interface ImpedanceTable {
  readonly logFrequencies: Float64Array;
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly lowerHz: number;
  readonly upperHz: number;
}

/** @source common practice: bounds that refuse slips of the pen, not unusual dampers */
const impedanceLimitNsPerM = 1e6;
const frequencyLimitHz = 1000;

function rowParts(row: ImpedanceRow, path: string): { re: number; im: number } {
  if ('realNsPerM' in row) {
    assertNumber(`${path}.realNsPerM`, row.realNsPerM, { atMost: impedanceLimitNsPerM });
    const limits = { atLeast: -impedanceLimitNsPerM, atMost: impedanceLimitNsPerM };
    assertNumber(`${path}.imaginaryNsPerM`, row.imaginaryNsPerM, limits);
    return { re: row.realNsPerM, im: row.imaginaryNsPerM };
  }
  assertNumber(`${path}.magnitudeNsPerM`, row.magnitudeNsPerM, { atLeast: 0, atMost: impedanceLimitNsPerM });
  assertNumber(`${path}.phaseRad`, row.phaseRad, { atLeast: -2 * Math.PI, atMost: 2 * Math.PI });
  return { re: row.magnitudeNsPerM * Math.cos(row.phaseRad), im: row.magnitudeNsPerM * Math.sin(row.phaseRad) };
}

/** A phase of exactly ±π/2 gives a real part of −1e−17 times the magnitude: rounding, not a damper that gives energy. */
const roundingRatio = 1e-12;

/**
 * Checks an impedance table and prepares it for interpolation.
 *
 * @param model rows [n ≥ 2] with rising frequencies [Hz] and impedance by parts or by magnitude and phase [N·s/m, rad]
 * @param path  name of the table in the caller's input
 * @returns logarithms of the frequencies and both parts [n]
 * @throws EngineInputError naming the row: too few rows, out of order, not finite, or a negative real part
 * @source closed form
 * @validity passive dampers: the real part is never negative
 * @accuracy exact at the rows
 */
export function impedanceTable(model: TableDamperModel, path: string): ImpedanceTable {
  const count = model.rows.length;
  if (count < 2) throw new EngineInputError(`${path}.rows`, 'must have at least two rows');
  const table = { logFrequencies: new Float64Array(count), re: new Float64Array(count), im: new Float64Array(count) };
  let before = 0;
  model.rows.forEach((row, index) => {
    const here = `${path}.rows[${index}]`;
    assertNumber(`${here}.frequencyHz`, row.frequencyHz, { above: 0, atMost: frequencyLimitHz });
    if (row.frequencyHz <= before) {
      throw new EngineInputError(`${here}.frequencyHz`, `must be above the row before, ${before} Hz`);
    }
    before = row.frequencyHz;
    const { re, im } = rowParts(row, here);
    if (re < -roundingRatio * Math.abs(im)) {
      throw new EngineInputError(
        here,
        `has a negative real part in row ${index + 1}: a damper takes energy, it gives none`,
      );
    }
    table.logFrequencies[index] = Math.log(row.frequencyHz);
    table.re[index] = Math.max(re, 0);
    table.im[index] = im;
  });
  return { ...table, lowerHz: model.rows[0]?.frequencyHz ?? 0, upperHz: before };
}

/**
 * Impedance of a table at given frequencies: linear in ln f on both parts, not a number outside the table.
 *
 * @param table         as prepared
 * @param frequenciesHz f, [n] [Hz], in any order
 * @returns real and imaginary parts [n] [N·s/m]; not a number where the table has no data
 * @source common practice
 * @validity inside the table, end points included; never extrapolated
 * @accuracy that of the table's spacing
 */
export function tableImpedance(table: ImpedanceTable, frequenciesHz: Float64Array): ImpedanceSeries {
  const { logFrequencies, re, im, lowerHz, upperHz } = table;
  const out = { re: new Float64Array(frequenciesHz.length), im: new Float64Array(frequenciesHz.length) };
  let interval = 0;
  for (let index = 0; index < frequenciesHz.length; index += 1) {
    const f = frequenciesHz[index] as number;
    if (f < lowerHz || f > upperHz) {
      out.re[index] = NaN;
      out.im[index] = NaN;
      continue;
    }
    const log = Math.log(f);
    while (interval > 0 && log < (logFrequencies[interval] as number)) interval -= 1;
    while (interval < logFrequencies.length - 2 && log >= (logFrequencies[interval + 1] as number)) interval += 1;
    const from = logFrequencies[interval] as number;
    const share = Math.min(Math.max((log - from) / ((logFrequencies[interval + 1] as number) - from), 0), 1);
    out.re[index] = (1 - share) * (re[interval] as number) + share * (re[interval + 1] as number);
    out.im[index] = (1 - share) * (im[interval] as number) + share * (im[interval + 1] as number);
  }
  return out;
}
