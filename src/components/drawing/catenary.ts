/** Standard acceleration of free fall, m/s². @source published: 3rd General Conference on Weights and Measures, 1901 */
const standardGravityMPerS2 = 9.80665;

export interface HangingWire {
  readonly tensionN: number;
  readonly massKgPerM: number;
  /** Horizontal distance between the attachments, > 0. */
  readonly spanLengthM: number;
  /** Height of the second attachment above the first; negative when it is lower. */
  readonly riseM: number;
}

/**
 * Height of a wire above its first attachment, at a horizontal distance from it.
 *
 * @param wire.tensionN horizontal component H, scalar [N], > 0
 * @param distanceM x, scalar [m], 0 to the span length
 * @returns height, scalar [m]; negative below the first attachment
 * @source closed form: catenary y = C·(cosh((x−x₀)/C) − cosh(x₀/C)), C = H/(m·g), through both attachments
 * @validity one uniform wire without bending stiffness; the everyday state, no ice and no wind
 */
export function catenaryHeightM(wire: HangingWire, distanceM: number): number {
  const catenaryM = wire.tensionN / (wire.massKgPerM * standardGravityMPerS2);
  const halfSpanRatio = wire.spanLengthM / (2 * catenaryM);
  const lowestM =
    wire.spanLengthM / 2 - catenaryM * Math.asinh(wire.riseM / (2 * catenaryM * Math.sinh(halfSpanRatio)));
  // Product form: the difference of two nearly equal cosines loses digits in a taut wire.
  return (
    2 * catenaryM * Math.sinh(distanceM / (2 * catenaryM)) * Math.sinh((distanceM - 2 * lowestM) / (2 * catenaryM))
  );
}

/** Greatest vertical distance between a wire and the straight line through its attachments, m, at mid-span. */
export function sagM(wire: HangingWire): number {
  return wire.riseM / 2 - catenaryHeightM(wire, wire.spanLengthM / 2);
}
