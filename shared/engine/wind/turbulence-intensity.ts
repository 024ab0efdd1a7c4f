import { assertNumber } from '../numerics/assert-number.ts';

/** Below this many roughness lengths the height is taken as this many. @source from memory: EN 1991-1-4 table 4.1, zmin/z0 of terrain IV is 10 */
const minimumHeightRatio = 10;

/**
 * Turbulence intensity of the wind at the height of the wire, I = 1/ln(h/z0).
 *
 * @param place.heightM    h, scalar [m], > 0, mean height of the wire above ground
 * @param place.roughnessM z0, scalar [m], > 0
 * @returns turbulence intensity, scalar [ratio], at most 0.434
 * @throws EngineInputError if an input is not finite or not above 0
 * @source published, EN 1991-1-4:2005 (4.7) with kI = 1 and co = 1, formula read second-hand
 * @validity flat terrain; a height below ten roughness lengths is taken as ten, where the logarithm is no longer meant
 * @accuracy exact for the stated formula
 */
export function turbulenceIntensity(place: { readonly heightM: number; readonly roughnessM: number }): number {
  assertNumber('heightM', place.heightM, { above: 0 });
  assertNumber('roughnessM', place.roughnessM, { above: 0 });
  return 1 / Math.log(Math.max(place.heightM / place.roughnessM, minimumHeightRatio));
}
