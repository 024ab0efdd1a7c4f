import { assertNumber } from '../numerics/assert-number.ts';
import { assertHangingSpan, type HangingSpan } from './catenary.ts';

/** Slope of the sag term in the length of a flat parabola. @source closed form: series of its arc length */
const lengthTermNumber = 8 / 3;

/**
 * Sag of a level span taken as a parabola, wS²/(8H).
 *
 * @param span span length [m], horizontal tension [N], weight per length [N/m], scalars, > 0
 * @returns sag, scalar [m]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form
 * @validity level span, sag below a tenth of the span
 * @accuracy below the catenary by (wS/H)²/48
 */
export function parabolaSag(span: HangingSpan): number {
  assertHangingSpan(span);
  return (span.weightNPerM * span.lengthM ** 2) / (8 * span.tensionN);
}

/**
 * Length of wire in a level parabolic span, S + 8D²/(3S).
 *
 * @param lengthM S, span length, scalar [m], > 0
 * @param sagM    D, scalar [m], ≥ 0
 * @returns wire length, scalar [m]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form: first two terms of the arc length
 * @validity level span, sag below a tenth of the span
 * @accuracy next term 32D⁴/(5S³)
 */
export function parabolaLength(lengthM: number, sagM: number): number {
  assertNumber('lengthM', lengthM, { above: 0 });
  assertNumber('sagM', sagM, { atLeast: 0 });
  return lengthM + (lengthTermNumber * sagM ** 2) / lengthM;
}
