import { normalCdf } from '../numerics/normal-cdf.ts';

/** @source from memory: lock-in index of the family of CIGRE TB 273 */
const lockInIndexRatio = 0.09;
/** Band of wind speed over the locked-in speed in which vortices stay in step. @source own model */
const lockInBand = { lowerRatio: 0.9, upperRatio: 1.3 } as const;

/**
 * Reduction of wind power by turbulence, q = 1/√(1 + (I/I_L)²), I_L = 0.09.
 *
 * @param turbulenceIntensityRatio I, scalar [ratio], ≥ 0
 * @returns q, scalar [ratio], 1 in smooth flow
 * @source from memory: form and lock-in index of the family of CIGRE TB 273; not read
 * @validity I up to about 0.5
 * @accuracy not known; see the terrain limits consistency test
 */
export function turbulenceFactor(turbulenceIntensityRatio: number): number {
  return 1 / Math.sqrt(1 + (turbulenceIntensityRatio / lockInIndexRatio) ** 2);
}

/**
 * Share of time in which the wind speed stays in the lock-in band, as a reduction of wind power.
 *
 * @param turbulenceIntensityRatio I, scalar [ratio], ≥ 0
 * @returns q, scalar [ratio], 1 in smooth flow
 * @source own model: q = Φ(0.3/I) − Φ(−0.1/I), Φ the normal distribution
 * @validity I up to about 0.5
 * @accuracy an estimate
 */
export function lockInTimeShare(turbulenceIntensityRatio: number): number {
  if (turbulenceIntensityRatio === 0) return 1;
  const { lowerRatio, upperRatio } = lockInBand;
  const upper = normalCdf((upperRatio - 1) / turbulenceIntensityRatio);
  return upper - normalCdf((lowerRatio - 1) / turbulenceIntensityRatio);
}
