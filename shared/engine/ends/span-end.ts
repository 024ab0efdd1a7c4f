import type { DamperModel } from '../dampers/damper-model.ts';

/** A damper on the wire, at a distance from the last point of contact at the wire clamp. */
export interface PlacedDamper {
  readonly distanceM: number;
  readonly model: DamperModel;
}

/** Armour rods: the wire with its rods, from the last point of contact to the end of the rods. */
export interface ArmourRods {
  readonly lengthM: number;
  /** Mass of wire and rods together. */
  readonly massKgPerM: number;
  /** Bending stiffness of wire and rods together. */
  readonly bendingStiffnessNm2: number;
}

/**
 * A clamp that moves with the wire, such as one on an insulator string, as this span feels it: in a suspension clamp
 * between two spans that swing alike, half of the clamp's mass, stiffness and damping.
 */
export interface ClampSupport {
  readonly massKg: number;
  readonly stiffnessNPerM: number;
  readonly dampingNsPerM: number;
}

/** One end of a span: a rigid clamp with any number of dampers, and an optional extra loss in the clamp. */
export interface SpanEnd {
  /** Factor on the reflected amplitude for losses in the clamp itself, 0 to 1; 1 when left out. */
  readonly clampReflectionRatio?: number | undefined;
  readonly dampers: readonly PlacedDamper[];
  readonly armourRods?: ArmourRods | undefined;
  /** Left out, the clamp stands still, as a tension dead-end does. */
  readonly support?: ClampSupport | undefined;
}
