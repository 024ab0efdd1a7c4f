/*
 * Coefficients of the continued-fraction-free rational form below.
 * @source published, G. West, Better approximations to cumulative normal functions, Wilmott (2005), after Hart (1968), double precision
 */
const numeratorCoefs = [
  3.52624965998911e-2, 0.700383064443688, 6.37396220353165, 33.912866078383, 112.079291497871, 221.213596169931,
  220.206867912376,
];
const denominatorCoefs = [
  8.83883476483184e-2, 1.75566716318264, 16.064177579207, 86.7807322029461, 296.564248779674, 637.333633378831,
  793.826512519948, 440.413735824752,
];
const tailStartNumber = 7.07106781186547;
const tailEndNumber = 37;
const rootTwoPi = Math.sqrt(2 * Math.PI);

const polynomial = (coefs: readonly number[], at: number) => coefs.reduce((sum, coef) => sum * at + coef, 0);

/**
 * Cumulative distribution of the standard normal variable.
 *
 * @param deviate z, scalar [number], any finite value
 * @returns probability below z, scalar [ratio]
 * @source published, G. West, Better approximations to cumulative normal functions (2005)
 * @validity all finite z
 * @accuracy about 1e-14 absolute
 */
export function normalCdf(deviate: number): number {
  const size = Math.abs(deviate);
  if (size > tailEndNumber) return deviate > 0 ? 1 : 0;
  const density = Math.exp(-size * size * 0.5);
  const upper =
    size < tailStartNumber
      ? (density * polynomial(numeratorCoefs, size)) / polynomial(denominatorCoefs, size)
      : density / ((size + 1 / (size + 2 / (size + 3 / (size + 4 / (size + 0.65))))) * rootTwoPi);
  return deviate > 0 ? 1 - upper : upper;
}
