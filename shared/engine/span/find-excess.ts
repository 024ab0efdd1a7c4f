/** How the span's length follows from a trial. */
export type LengthOf = (excessRatio: number) => number;

/** Length is told to 1e-11, so the amplitude is: dlnB/dln L ≤ 2 for every curve with log-slope below 2. */
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
 * @param startS first guess of s
 * @returns s, or Infinity if even the top amplitude needs less wire than L
 * @source closed form
 * @validity one root
 * @accuracy 1e-11 in the length
 */
export function findExcess(lengthOf: LengthOf, spanLengthM: number, startS: number): number {
  let lower: number = excessRange.lowerS;
  let upper: number = excessRange.upperS;
  let s = Math.min(Math.max(startS, lower), upper);
  let before = NaN;
  let errorBefore = NaN;
  for (let step = 0; step < stepLimitCount; step += 1) {
    const error = Math.log(lengthOf(Math.exp(-s)) / spanLengthM);
    if (Math.abs(error) <= toleranceRatio) return s;
    if (error < 0) lower = s;
    else upper = s;
    if (lower >= excessRange.upperS) return Infinity;
    let next = s - error / (step === 0 ? firstSlope(s) : (error - errorBefore) / (s - before));
    if (!(next > lower && next < upper)) next = nextInside({ lower, upper, s });
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
