import type { DamperType } from '#shared/contract/catalogue.ts';
import { halfDamperImpedance } from '#shared/engine/dampers/half-damper-impedance.ts';

export interface ImpedancePoint {
  readonly frequencyHz: number;
  readonly magnitudeNsPerM: number;
}

/** Band in which a damper known by its parts is drawn; aeolian vibration lies inside it. */
const drawnBandHz = { lower: 3, upper: 100 } as const;
const drawnCount = 389;

type ImpedanceRow = Extract<DamperType['model'], { kind: 'table' }>['rows'][number];

function rowMagnitude(row: ImpedanceRow): number {
  return 'magnitudeNsPerM' in row ? row.magnitudeNsPerM : Math.hypot(row.realNsPerM, row.imaginaryNsPerM);
}

/** Size of a damper's impedance against frequency: the rows of its table, or the curve of its parts. */
export function impedancePoints(model: DamperType['model']): ImpedancePoint[] {
  if (model.kind === 'table') {
    return model.rows.map((row) => ({ frequencyHz: row.frequencyHz, magnitudeNsPerM: rowMagnitude(row) }));
  }
  const stepHz = (drawnBandHz.upper - drawnBandHz.lower) / (drawnCount - 1);
  const frequenciesHz = Array.from({ length: drawnCount }, (_, index) => drawnBandHz.lower + index * stepHz);
  const impedance = halfDamperImpedance(
    model,
    Float64Array.from(frequenciesHz, (frequencyHz) => 2 * Math.PI * frequencyHz),
  );
  return frequenciesHz.map((frequencyHz, index) => ({
    frequencyHz,
    magnitudeNsPerM: Math.hypot(impedance.re[index] ?? 0, impedance.im[index] ?? 0),
  }));
}
