/** @source published: C. Lanczos, SIAM J. Numer. Anal. 1 (1964) 86; coefficients for g = 7, n = 9 as widely printed */
const lanczosShift = 7;
const lanczosCoefs = [
  0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059,
  12.507343278686905, -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7,
];

/**
 * Gamma function of a real number above 0.5.
 *
 * @param argument x, scalar, above 0.5
 * @returns Γ(x), scalar [number]
 * @source published: Lanczos' approximation
 * @validity x > 0.5 up to 170
 * @accuracy about 1e-14 relative
 */
export function gammaFunction(argument: number): number {
  const x = argument - 1;
  const series = lanczosCoefs.slice(1).reduce((sum, coef, index) => sum + coef / (x + index + 1), lanczosCoefs[0] ?? 0);
  const t = x + lanczosShift + 0.5;
  return Math.sqrt(2 * Math.PI) * t ** (x + 0.5) * Math.exp(-t) * series;
}
