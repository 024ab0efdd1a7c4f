import type { WindPowerRow } from '../wind/table-wind-curve.ts';

/** Tables and fits of the user, taken where a method name asks for one. */
export interface UserCurves {
  readonly windPower?: { readonly rows: readonly WindPowerRow[]; readonly source: string } | undefined;
  readonly turbulence?:
    | {
        readonly rows: readonly { readonly turbulenceIntensityRatio: number; readonly factorRatio: number }[];
        readonly source: string;
      }
    | undefined;
  /** P[mW/m] = coefficient·(A/D)^l·f^m/T^n, T in kN. */
  readonly selfDamping?:
    | {
        readonly coefficientNumber: number;
        readonly amplitudeExponentNumber: number;
        readonly frequencyExponentNumber: number;
        readonly tensionExponentNumber: number;
        readonly source: string;
      }
    | undefined;
}
