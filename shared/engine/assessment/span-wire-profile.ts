import type { SpanWireCase, SpanWireProfile, VibrationBasis } from './span-wire-assessment.ts';

/** Where a profile is wanted. */
export interface ProfileRequest {
  readonly frequencyHz: number;
  readonly pointCount?: number | undefined;
}

/** Amplitude and energy flux along the span at one frequency. */
export function spanWireProfile(
  _input: SpanWireCase,
  _basis: VibrationBasis,
  _request: ProfileRequest,
): SpanWireProfile {
  throw new Error('the profile is not in this commit yet');
}
