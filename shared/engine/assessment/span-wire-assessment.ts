import type { WindClimate } from '../climate/wind-climate.ts';
import type { SpanEnd } from '../ends/span-end.ts';
import type { PartialMethodChoice } from '../methods/method-choice.ts';
import type { EngineWarning, MethodNote } from '../methods/method-note.ts';
import type { UserCurves } from '../methods/user-curves.ts';
import type { EndPair, SpanOutcome, SpanRow } from '../span/span-row.ts';
import type { WireProperties } from '../span/wire-properties.ts';

/** Everything that one span wire needs; plain JSON, kept with the result. */
export interface SpanWireCase {
  readonly wire: WireProperties;
  /** `bearingRad`: bearing of the span from true north, 0 to 2π. */
  readonly span: { readonly lengthM: number; readonly tensionN: number; readonly bearingRad: number };
  readonly air: { readonly densityKgPerM3: number; readonly turbulenceIntensityRatio: number };
  readonly ends: readonly [SpanEnd, SpanEnd];
}

/** The part of a basis that the engine applies. */
export interface VibrationBasis {
  readonly windBand: { readonly lowerMPerS: number; readonly upperMPerS: number };
  readonly frequencyCount: number;
  readonly methods: PartialMethodChoice;
  /** Tables and fits for the methods that ask for one. */
  readonly curves?: UserCurves | undefined;
  /** Endurance limit for this kind of conductor, zero to peak. */
  readonly endurance: { readonly stressPa: number; readonly source: string };
  /** Strain limit for ends with dampers; null leaves the endurance limit alone. */
  readonly damperedStrain: {
    readonly strainRatio: number;
    readonly convention: 'peak-to-peak' | 'zero-to-peak';
    readonly source: string;
  } | null;
  readonly fatigueCurve: 'single-layer' | 'multi-layer';
  readonly climate: WindClimate | null;
  readonly yearsInService?: number | undefined;
}

/** The worst place, frequency and limit of a sweep. */
export interface WorstPlace {
  readonly utilisationRatio: number;
  readonly stressPa: number;
  readonly strainRatio: number;
  /** The limit that governs, as stress of the outer strand, zero to peak. */
  readonly limitStressPa: number;
  readonly limitKind: 'endurance-stress' | 'dampered-strain';
  readonly limitSource: string;
  readonly frequencyHz: number;
  readonly windSpeedMPerS: number;
  readonly endIndex: 0 | 1;
  readonly place: 'clamp' | 'damper-clamp';
  /** Position in the end's list of dampers; null at the wire clamp. */
  readonly damperIndex: number | null;
  readonly amplitudeM: number;
}

/** Fatigue life by Miner's sum over the wind climate. */
export type FatigueLife =
  | { readonly outcome: 'finite'; readonly years: number; readonly damagePerYearRatio: number }
  | { readonly outcome: 'unlimited' }
  | { readonly outcome: 'no-climate' };

/** What one assessment of a span wire gives. */
export interface SpanWireAssessment {
  /** Outcome of the worst row. */
  readonly outcome: SpanOutcome;
  readonly worst: WorstPlace | null;
  /** Worst stress at the clamp of each end. */
  readonly endWorst: EndPair<{ readonly stressPa: number; readonly frequencyHz: number } | null>;
  /** Band of frequencies and wind speeds in which a limit is exceeded. */
  readonly exceedance: {
    readonly frequencyLowerHz: number;
    readonly frequencyUpperHz: number;
    readonly windLowerMPerS: number;
    readonly windUpperMPerS: number;
  } | null;
  /** Share of the arriving wave power that each end absorbs at the worst frequency. */
  readonly endAbsorbedRatioAtWorst: EndPair<number>;
  readonly energyAtWorst: {
    readonly windPowerW: number;
    readonly selfDampingPowerW: number;
    readonly endPowerW: EndPair<number>;
    readonly closureRatio: number;
  } | null;
  readonly life: FatigueLife;
  /** How finely the band was searched, and the share by which the worst stress may still be higher between points. */
  readonly search: { readonly frequencyCount: number; readonly worstErrorRatio: number };
  readonly methods: readonly MethodNote[];
  readonly warnings: readonly EngineWarning[];
}

/** Row of the full sweep: the balance with stresses at the clamps and the share of the governing limit used. */
export interface SpanSeriesRow extends SpanRow {
  clampStressPa: EndPair<number | null>;
  utilisationRatio: number | null;
}

/** Response of one end at one frequency; null where a damper has no data. */
export interface EndSeriesRow {
  frequencyHz: number;
  reflectionRatio: number | null;
  absorbedRatio: number | null;
  iswRatio: number | null;
}

/** The full sweep for charts. */
export interface SpanWireSeries {
  rows: SpanSeriesRow[];
  ends: EndPair<EndSeriesRow[]>;
  methods: MethodNote[];
  warnings: EngineWarning[];
}

/** Amplitude and net energy flux towards the right end along the span; empty where the outcome has none. */
export interface SpanWireProfile {
  outcome: SpanOutcome;
  frequencyHz: number;
  positionsM: number[];
  amplitudesM: number[];
  fluxesW: number[];
}
