import { assertNumber } from '../numerics/assert-number.ts';
import { EngineInputError } from '../numerics/engine-input-error.ts';

/** A level span that may stretch and move in its own plane. */
export interface ElasticSpan {
  readonly lengthM: number;
  readonly tensionN: number;
  readonly weightNPerM: number;
  /** EA of the wire, or with yielding ends in series. */
  readonly axialStiffnessN: number;
}

/**
 * Axial stiffness of a wire in series with yielding ends, 1/(1/EA + 1/(K·L)).
 *
 * @param axialStiffnessN    EA, scalar [N], > 0
 * @param supportStiffnessNPerM K, horizontal, seen by the whole length, scalar [N/m], > 0
 * @param lengthM            L, scalar [m], > 0
 * @returns effective axial stiffness, scalar [N]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form: springs in series
 * @validity linear supports
 * @accuracy rounding
 */
export function effectiveAxialStiffness(
  axialStiffnessN: number,
  supportStiffnessNPerM: number,
  lengthM: number,
): number {
  assertNumber('axialStiffnessN', axialStiffnessN, { above: 0 });
  assertNumber('supportStiffnessNPerM', supportStiffnessNPerM, { above: 0 });
  assertNumber('lengthM', lengthM, { above: 0 });
  return 1 / (1 / axialStiffnessN + 1 / (supportStiffnessNPerM * lengthM));
}

/**
 * Irvine's parameter λ² = (wL/H)²·L·EA/(H·L_e), L_e = L(1 + 8(s/L)²), s = wL²/(8H).
 *
 * @param span L [m], H [N], w [N/m], EA [N], scalars, > 0
 * @returns λ², scalar
 * @throws EngineInputError if an input is outside its bounds
 * @source published: H. M. Irvine and T. K. Caughey, Proc. R. Soc. A 341 (1974) 299-315; read second-hand
 * @validity level span, sag below an eighth of the span
 * @accuracy rounding
 */
export function irvineParameter(span: ElasticSpan): number {
  const { lengthM: L, tensionN: H, weightNPerM: w, axialStiffnessN: EA } = span;
  assertNumber('lengthM', L, { above: 0 });
  assertNumber('tensionN', H, { above: 0 });
  assertNumber('weightNPerM', w, { above: 0 });
  assertNumber('axialStiffnessN', EA, { above: 0 });
  const sagRatio = (w * L) / (8 * H);
  return (((w * L) / H) ** 2 * EA) / (H * (1 + 8 * sagRatio ** 2));
}

/**
 * Frequency of a symmetric mode in the plane of the span over that of the string, 2u/π with
 * tan u = u − 4u³/λ².
 *
 * @param irvineNumber λ², scalar, > 0
 * @param modeCount    number of the symmetric mode, 1, 2, …
 * @returns frequency over the string's fundamental, scalar [ratio]
 * @throws EngineInputError if an input is outside its bounds
 * @source published: H. M. Irvine and T. K. Caughey, Proc. R. Soc. A 341 (1974) 299-315; read second-hand
 * @validity level span, sag below an eighth of the span
 * @accuracy 1e-12 relative
 */
export function symmetricModeRatio(irvineNumber: number, modeCount: number): number {
  assertNumber('irvineNumber', irvineNumber, { above: 0 });
  assertNumber('modeCount', modeCount, { atLeast: 1, atMost: 1000 });
  if (!Number.isInteger(modeCount)) throw new EngineInputError('modeCount', 'must be a whole number');
  // Multiplied by the cosine: no poles. One root lies between each odd multiple of π/2 and the next.
  const secular = (u: number) => Math.sin(u) - Math.cos(u) * (u - (4 * u ** 3) / irvineNumber);
  let low = (modeCount - 0.5) * Math.PI;
  let high = (modeCount + 0.5) * Math.PI;
  const rising = Math.sign(secular(high));
  const halvingCount = 60;
  for (let index = 0; index < halvingCount; index += 1) {
    const middle = (low + high) / 2;
    if (Math.sign(secular(middle)) === rising) high = middle;
    else low = middle;
  }
  return (low + high) / Math.PI;
}
