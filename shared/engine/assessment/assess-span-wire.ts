import type { EndResponseCache } from './end-response-cache.ts';
import type { SpanWireAssessment, SpanWireCase, VibrationBasis } from './span-wire-assessment.ts';

/** Worst stress, its place and the fatigue life of one span wire over the wind band of a basis. */
export function assessSpanWire(
  _input: SpanWireCase,
  _basis: VibrationBasis,
  _reuse?: EndResponseCache,
): SpanWireAssessment {
  throw new Error('the sweep is not in this commit yet');
}
