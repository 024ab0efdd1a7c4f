import { assertNumber } from '../numerics/assert-number.ts';

/** A wire hanging between two attachments at a known horizontal tension. */
export interface HangingSpan {
  readonly lengthM: number;
  readonly riseM?: number;
  readonly tensionN: number;
  readonly weightNPerM: number;
}

/** Shape and forces of a hanging wire. */
export interface HangingShape {
  /** Greatest sag below the chord. */
  readonly sagM: number;
  readonly wireLengthM: number;
  /** Horizontal distance of the lowest point from the lower-indexed end; it may lie outside the span. */
  readonly lowPointM: number;
  /** Tension along the wire at [left, right]. */
  readonly endTensionsN: readonly [number, number];
}

/** cosh of larger arguments overflows; no real span comes near. */
const steepestNumber = 300;

/**
 * Refuses a hanging span outside its bounds.
 *
 * @param span span length [m] > 0, rise [m], horizontal tension [N] > 0, weight per length [N/m] > 0
 * @throws EngineInputError naming the field
 * @source common practice
 */
export function assertHangingSpan(span: HangingSpan): void {
  assertNumber('lengthM', span.lengthM, { above: 0 });
  assertNumber('riseM', span.riseM ?? 0);
  assertNumber('weightNPerM', span.weightNPerM, { above: 0 });
  assertNumber('tensionN', span.tensionN, { above: 0 });
  const leastN = (span.weightNPerM * span.lengthM) / (2 * steepestNumber);
  assertNumber('tensionN', span.tensionN, { atLeast: leastN });
}

/**
 * Catenary of a wire between attachments at the same or different heights.
 *
 * @param span.lengthM      S, scalar [m], > 0, horizontal
 * @param span.riseM        h, scalar [m], right attachment above the left one; 0 when left out
 * @param span.tensionN     H, scalar [N], > 0, horizontal component
 * @param span.weightNPerM  w, scalar [N/m], > 0, resultant load per length of wire
 * @returns sag, wire length, low point and end tensions
 * @throws EngineInputError if an input is outside its bounds, or the wire would hang nearly vertical
 * @source closed form: y = (H/w)·cosh(w(x − x₀)/H), derived; see tests/reference/statics
 * @validity wire without bending stiffness, uniform load along the wire
 * @accuracy rounding; half-angle forms lose no digits in flat spans
 */
export function catenary(span: HangingSpan): HangingShape {
  assertHangingSpan(span);
  const { lengthM: S, riseM: h = 0, tensionN: H, weightNPerM: w } = span;
  const c = H / w;
  const half = S / (2 * c);
  const chordSlack = 2 * c * Math.sinh(half);
  const lowPointM = S / 2 - c * Math.asinh(h / chordSlack);
  const steepest = lowPointM + c * Math.asinh(h / S);
  // The sag at that point as a product of sinh: a difference of two cosh would cancel in flat spans.
  const fall = 2 * c * Math.sinh((steepest - 2 * lowPointM) / (2 * c)) * Math.sinh(steepest / (2 * c));
  const sagM = (h * steepest) / S - fall;
  return {
    sagM,
    wireLengthM: Math.hypot(chordSlack, h),
    lowPointM,
    endTensionsN: [H * Math.cosh(lowPointM / c), H * Math.cosh((S - lowPointM) / c)],
  };
}

/**
 * Length of wire beyond the span of a level catenary, (2H/w)·sinh(wS/2H) − S.
 *
 * @param span as for the catenary, level
 * @returns slack, scalar [m]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form
 * @validity level span
 * @accuracy rounding; a series replaces the difference where it would cancel
 */
export function catenarySlack(span: HangingSpan): number {
  assertHangingSpan(span);
  const half = (span.weightNPerM * span.lengthM) / (2 * span.tensionN);
  if (half > 1) return span.lengthM * (Math.sinh(half) / half - 1);
  let term = 1;
  let sum = 0;
  const termCount = 12;
  for (let index = 1; index <= termCount; index += 1) {
    term *= half ** 2 / (2 * index * (2 * index + 1));
    sum += term;
  }
  return span.lengthM * sum;
}

/**
 * Mean tension along the wire of a level catenary, (1/L)·∫T ds.
 *
 * @param span as for the catenary, level
 * @returns mean tension, scalar [N]
 * @throws EngineInputError if an input is outside its bounds
 * @source closed form: H(S + c·sinh(S/c))/(2L), c = H/w
 * @validity level span
 * @accuracy rounding
 */
export function catenaryMeanTension(span: HangingSpan): number {
  assertHangingSpan(span);
  const { lengthM: S, tensionN: H, weightNPerM: w } = span;
  const c = H / w;
  const wireLengthM = 2 * c * Math.sinh(S / (2 * c));
  return (H * (S + c * Math.sinh(S / c))) / (2 * wireLengthM);
}
