/** How the span's length follows from a trial. */
export type LengthOf = (excessRatio: number) => number;

/** First guess of s and of the slope of ln L against s (0: none); the slope is overwritten by the one found. */
export interface ExcessTrial {
  s: number;
  slope: number;
}

/** The length is met to 1e-11, and so is B: dln B/dln L ≤ 2 for every curve with log-slope below 2. */
const toleranceRatio = 1e-11;
const stepLimitCount = 80;
/** Beyond these the larger end is at the top amplitude, or the amplitude is nothing, to the last digit. */
export const excessRange = { lowerS: -600, upperS: 600 } as const;

/** Slope of ln L against s to start from: 2 − a for small amplitudes, 1/s when the pole governs. */
const firstSlope = (s: number) => (s < 0 ? 0.5 : 1 / (2 + s));

/**
 * Solves ln(length(s)/L) = 0 for s = ln(B/(B_top − B)), excess = e^−s, by secant steps held in a bracket.
 *
 * @param lengthOf length of wire for an excess, rising with s
 * @param spanLengthM L, scalar [m], > 0
 * @param trial first guess; left with the slope at the root
 * @returns s, or Infinity if even the top amplitude needs less wire than L
 * @source closed form
 * @validity one root
 * @accuracy 1e-9 in the length: the last secant step is taken unseen where the two errors before it say that it is safe
 */
export function findExcess(lengthOf: LengthOf, spanLengthM: number, trial: ExcessTrial): number {
  let lower: number = excessRange.lowerS;
  let upper: number = excessRange.upperS;
  let s = Math.min(Math.max(trial.s, lower), upper);
  let before = NaN;
  let errorBefore = NaN;
  for (let step = 0; step < stepLimitCount; step += 1) {
    const error = Math.log(lengthOf(Math.exp(-s)) / spanLengthM);
    if (Math.abs(error) <= toleranceRatio) return s;
    if (error < 0) lower = s;
    else upper = s;
    if (lower >= excessRange.upperS) return Infinity;
    if (step > 0) trial.slope = (error - errorBefore) / (s - before);
    else if (!(trial.slope > 0)) trial.slope = firstSlope(s);
    let next = s - error / trial.slope;
    const isInside = next > lower && next < upper;
    // A secant step leaves about the product of both errors before it, times a curvature below 1.
    if (isInside && Math.abs(error * errorBefore) <= toleranceRatio) return next;
    if (!isInside) next = nextInside({ lower, upper, s });
    if (next === s || upper - lower < Number.EPSILON * Math.abs(s)) return s;
    before = s;
    errorBefore = error;
    s = next;
  }
  return s;
}

/** A trial inside the bracket where the secant left it: outwards by leaps while one side is open, else the middle. */
function nextInside({ lower, upper, s }: { lower: number; upper: number; s: number }): number {
  const reach = 4 + 3 * Math.abs(s);
  if (upper >= excessRange.upperS && s === lower) return Math.min(upper, s + reach);
  if (lower <= excessRange.lowerS && s === upper) return Math.max(lower, s - reach);
  return (lower + upper) / 2;
}
