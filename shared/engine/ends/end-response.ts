/**
 * Response of one end of a span at a list of frequencies, as plain arrays. Curvatures and damper motions are per
 * antinode amplitude of the first free loop outside the dampers; dampers are in the order of the input.
 */
export interface EndResponse {
  /** 1 where every damper has data, 0 where one has none; all other arrays hold 0 there. */
  readonly hasData: Uint8Array;
  readonly reflectionRe: Float64Array;
  readonly reflectionIm: Float64Array;
  /** Modulus of the reflection, 0 to 1, with the loss of the clamp. */
  readonly reflectionRatio: Float64Array;
  readonly clampCurvaturePerM2: Float64Array;
  readonly damperCurvaturePerM2: readonly Float64Array[];
  /** Displacement of each damper clamp over the antinode amplitude. */
  readonly damperMotionRatio: readonly Float64Array[];
}

/**
 * An empty response.
 *
 * @param frequencyCount number of frequencies, whole number ≥ 0
 * @param damperCount number of dampers, whole number ≥ 0
 * @returns arrays of zeros of the right lengths
 * @source closed form
 */
export function emptyEndResponse(frequencyCount: number, damperCount: number): EndResponse {
  const series = () => new Float64Array(frequencyCount);
  return {
    hasData: new Uint8Array(frequencyCount),
    reflectionRe: series(),
    reflectionIm: series(),
    reflectionRatio: series(),
    clampCurvaturePerM2: series(),
    damperCurvaturePerM2: Array.from({ length: damperCount }, series),
    damperMotionRatio: Array.from({ length: damperCount }, series),
  };
}
