import type { DamperModel } from '../dampers/damper-model.ts';

/** A damper on the wire, at a distance from the last point of contact at the wire clamp. */
export interface PlacedDamper {
  readonly distanceM: number;
  readonly model: DamperModel;
}

/** One end of a span: a rigid clamp with any number of dampers, and an optional extra loss in the clamp. */
export interface SpanEnd {
  /** Factor on the reflected amplitude for losses in the clamp itself, 0 to 1; 1 when left out. */
  readonly clampReflectionRatio?: number | undefined;
  readonly dampers: readonly PlacedDamper[];
}
