import type { SpanWireCase, VibrationBasis } from '../assessment/span-wire-assessment.ts';
import type { DamperModel } from '../dampers/damper-model.ts';
import type { MethodNote } from '../methods/method-note.ts';

/** A damper of the catalogue that may be placed. */
export interface CatalogueDamper {
  readonly name: string;
  readonly model: DamperModel;
}

/** Task of the search: both ends of the span get the same dampers. */
export interface PlacementTask {
  /** Wire, span, air; the dampers of its ends are replaced. */
  readonly input: SpanWireCase;
  readonly basis: VibrationBasis;
  readonly catalogue: readonly CatalogueDamper[];
  /** Most dampers per end, 0 to 3. */
  readonly damperLimitCount: number;
  readonly distance: { readonly lowerM: number; readonly upperM: number; readonly stepM: number };
  /** How far a damper may be fitted from its plan. */
  readonly toleranceM: number;
  /** Tensions over the seasons; the placement must do for each. */
  readonly tensionsN: readonly number[];
}

/** A damper in the plan of an end. */
export interface PlannedDamper {
  readonly catalogueIndex: number;
  readonly name: string;
  readonly distanceM: number;
}

/** How an end with the planned dampers absorbs, and how much of the limit is used, at one tension. */
export interface PlacementReason {
  readonly tensionN: number;
  readonly rows: readonly {
    readonly frequencyHz: number;
    readonly absorbedRatio: number;
    readonly utilisationRatio: number;
  }[];
}

/** The best placement found for a number of dampers per end. */
export interface PlacementChoice {
  readonly damperCount: number;
  readonly dampers: readonly PlannedDamper[];
  /** Worst use of a limit over frequencies, tensions and fitting tolerance, by the full assessment. */
  readonly worstUtilisationRatio: number;
  readonly worstStressPa: number;
  /** The same as planned, without the tolerance. */
  readonly plannedUtilisationRatio: number;
  /** False if fewer dampers do as well. */
  readonly isWorthwhile: boolean;
  readonly reasons: readonly PlacementReason[];
}

/** Result of the search, fewest dampers first. */
export interface PlacementResult {
  readonly choices: readonly PlacementChoice[];
  readonly trialCount: number;
  readonly methods: readonly MethodNote[];
}

/** Progress of the search. */
export interface PlacementProgress {
  readonly doneRatio: number;
  readonly trialCount: number;
}
