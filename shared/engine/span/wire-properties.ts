import { assertNumber } from '../numerics/assert-number.ts';
import { EngineInputError } from '../numerics/engine-input-error.ts';

/** What the engine must know of a wire. */
export interface WireProperties {
  readonly diameterM: number;
  readonly massKgPerM: number;
  readonly ratedStrengthN: number;
  /** Bending stiffness with all strands sliding freely. */
  readonly bendingStiffnessMinNm2: number;
  readonly outerStrandDiameterM: number;
  readonly outerStrandModulusPa: number;
}

/** @source common practice: bounds that refuse slips of the pen, not unusual wires */
const wireLimits = {
  diameterM: { atLeast: 0.001, atMost: 0.2 },
  massKgPerM: { atLeast: 0.005, atMost: 50 },
  ratedStrengthN: { atLeast: 100, atMost: 5e6 },
  bendingStiffnessMinNm2: { atLeast: 1e-4, atMost: 1e6 },
  outerStrandDiameterM: { atLeast: 1e-4, atMost: 0.2 },
  outerStrandModulusPa: { atLeast: 1e9, atMost: 1e12 },
} as const;

/**
 * Refuses a wire that cannot be.
 *
 * @param wire as stated in WireProperties
 * @param path name of the wire in the caller's input
 * @throws EngineInputError naming the field; an outer strand thicker than the wire is refused
 * @source common practice
 */
export function assertWireProperties(wire: WireProperties, path: string): void {
  for (const [key, limits] of Object.entries(wireLimits)) {
    assertNumber(`${path}.${key}`, wire[key as keyof WireProperties], limits); // keys of the table are keys of a wire
  }
  if (wire.outerStrandDiameterM > wire.diameterM) {
    throw new EngineInputError(
      `${path}.outerStrandDiameterM`,
      `must not exceed the diameter of the wire, ${wire.diameterM}`,
    );
  }
}

/** @source common practice */
const tensionLimits = { atLeast: 1 } as const;

/**
 * Refuses a tension that is no tension of this wire.
 *
 * @param tensionN T, scalar [N], > 0 and at most the rated strength
 * @param wire     rated strength and its path, and the path of the tension
 * @throws EngineInputError naming the tension
 * @source common practice
 */
export function assertTension(
  tensionN: number,
  wire: { readonly path: string; readonly ratedStrengthN: number },
): void {
  assertNumber(wire.path, tensionN, tensionLimits);
  if (tensionN > wire.ratedStrengthN) {
    throw new EngineInputError(wire.path, `is above the rated strength of the wire, ${wire.ratedStrengthN} N`);
  }
}
