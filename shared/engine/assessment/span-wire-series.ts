import type { SpanWireCase, SpanWireSeries, VibrationBasis } from './span-wire-assessment.ts';

/** The full sweep over the wind band of a basis, row by row, for charts. */
export function spanWireSeries(_input: SpanWireCase, _basis: VibrationBasis): SpanWireSeries {
  throw new Error('the sweep is not in this commit yet');
}
