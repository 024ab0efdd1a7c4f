import { assertNumber } from '../numerics/assert-number.ts';
import { EngineInputError } from '../numerics/engine-input-error.ts';
import { amplitudeLimitRatio, type WindPowerCurve, type WindPowerPiece } from './wind-power-curve.ts';

/** Row of a reduced wind power table: fnc at an amplitude over diameter. */
export interface WindPowerRow {
  readonly amplitudeRatio: number;
  readonly windPowerNumber: number;
}

/**
 * Reduced wind power from a table, straight lines between the rows in log–log.
 *
 * @param rows [n ≥ 2], amplitudes rising and > 0 up to at least 0.5, values > 0
 * @param path name of the table in the caller's input
 * @returns pieces of the curve; below the first row the first slope is carried on
 * @throws EngineInputError naming the row: out of order, not positive, ending below 0.5, or rising as fast as x² —
 *   then the balance of a span would have several steady states
 * @source that of the table
 * @validity that of the table
 * @accuracy exact at the rows
 */
export function tableWindCurve(rows: readonly WindPowerRow[], path: string): WindPowerCurve {
  if (rows.length < 2) throw new EngineInputError(path, 'must have at least two rows');
  const pieces: WindPowerPiece[] = [];
  rows.forEach((row, index) => {
    const here = `${path}[${index}]`;
    assertNumber(`${here}.amplitudeRatio`, row.amplitudeRatio, { above: 0, atMost: 10 });
    assertNumber(`${here}.windPowerNumber`, row.windPowerNumber, { above: 0, atMost: 1e6 });
    const before = rows[index - 1];
    if (before === undefined) return;
    if (row.amplitudeRatio <= before.amplitudeRatio) {
      throw new EngineInputError(`${here}.amplitudeRatio`, `must be above the row before, ${before.amplitudeRatio}`);
    }
    const rise = Math.log(row.windPowerNumber / before.windPowerNumber);
    const exponentNumber = rise / Math.log(row.amplitudeRatio / before.amplitudeRatio);
    if (exponentNumber >= 2) {
      throw new EngineInputError(
        here,
        'rises as the square of the amplitude or faster: several steady states are possible',
      );
    }
    const levelNumber = row.windPowerNumber / row.amplitudeRatio ** exponentNumber;
    pieces.push({ kind: 'power', upperRatio: row.amplitudeRatio, levelNumber, exponentNumber });
  });
  if ((rows.at(-1)?.amplitudeRatio ?? 0) < amplitudeLimitRatio) {
    throw new EngineInputError(path, `must reach A/D ${amplitudeLimitRatio}`);
  }
  return pieces;
}
