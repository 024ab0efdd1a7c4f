/** Outcome of the energy balance at one frequency. */
export type SpanOutcome = 'steady' | 'quiet' | 'amplitude-limit' | 'no-damper-data';

/** A value at the left and at the right end of the span. */
export type EndPair<Value> = [left: Value, right: Value];

/**
 * Result of the energy balance of a span at one frequency. Amplitudes are zero to peak at an antinode; strains zero to
 * peak. Numbers that the outcome does not have are null.
 */
export interface SpanRow {
  frequencyHz: number;
  windSpeedMPerS: number;
  outcome: SpanOutcome;
  midAmplitudeM: number | null;
  endAmplitudeM: EndPair<number | null>;
  endReflectionRatio: EndPair<number | null>;
  clampStrainRatio: EndPair<number | null>;
  damperClampStrainRatio: EndPair<(number | null)[]>;
  windPowerW: number | null;
  selfDampingPowerW: number | null;
  endPowerW: EndPair<number | null>;
  energyClosureRatio: number | null;
}
