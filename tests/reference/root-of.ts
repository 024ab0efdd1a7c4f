const stepLimitCount = 200;

/** Root of a function that changes sign in a bracket, by halving: an own numeric for tests, not the engine's. */
export function rootOf(f: (at: number) => number, bracket: { lower: number; upper: number }): number {
  let { lower, upper } = bracket;
  const isLowerNegative = f(lower) < 0;
  for (let step = 0; step < stepLimitCount; step += 1) {
    const middle = (lower + upper) / 2;
    if (f(middle) < 0 === isLowerNegative) lower = middle;
    else upper = middle;
  }
  return (lower + upper) / 2;
}
