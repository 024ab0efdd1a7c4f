import { assertNumber } from '../numerics/assert-number.ts';
import { EngineInputError } from '../numerics/engine-input-error.ts';

/** Row of a turbulence table. */
export interface TurbulenceRow {
  readonly turbulenceIntensityRatio: number;
  readonly factorRatio: number;
}

/**
 * Reduction of wind power by turbulence from a table, straight lines between the rows, end values held.
 *
 * @param rows [n ≥ 1] turbulence intensities rising from ≥ 0, factors 0 to 1 and not 0
 * @param turbulenceIntensityRatio I, scalar [ratio], ≥ 0
 * @returns q, scalar [ratio]
 * @throws EngineInputError naming the row in `curves.turbulence.rows`
 * @source that of the table
 * @validity that of the table
 * @accuracy exact at the rows
 */
export function tableTurbulenceFactor(rows: readonly TurbulenceRow[], turbulenceIntensityRatio: number): number {
  const first = rows[0];
  if (first === undefined) throw new EngineInputError('curves.turbulence.rows', 'must have at least one row');
  let before = first;
  let factor = first.factorRatio;
  rows.forEach((row, index) => {
    const here = `curves.turbulence.rows[${index}]`;
    assertNumber(`${here}.turbulenceIntensityRatio`, row.turbulenceIntensityRatio, { atLeast: 0, atMost: 1 });
    assertNumber(`${here}.factorRatio`, row.factorRatio, { above: 0, atMost: 1 });
    if (index > 0 && row.turbulenceIntensityRatio <= before.turbulenceIntensityRatio) {
      const text = `must be above the row before, ${before.turbulenceIntensityRatio}`;
      throw new EngineInputError(`${here}.turbulenceIntensityRatio`, text);
    }
    if (turbulenceIntensityRatio >= row.turbulenceIntensityRatio) factor = row.factorRatio;
    else if (index > 0 && turbulenceIntensityRatio > before.turbulenceIntensityRatio) {
      const width = row.turbulenceIntensityRatio - before.turbulenceIntensityRatio;
      const share = (turbulenceIntensityRatio - before.turbulenceIntensityRatio) / width;
      factor = (1 - share) * before.factorRatio + share * row.factorRatio;
    }
    before = row;
  });
  return factor;
}
