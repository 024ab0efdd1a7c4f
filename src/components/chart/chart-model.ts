/** What a chart shows, in display units and without a word about how it is drawn. */

/** The thing a series stands for; one thing has one colour in every chart. */
export type ChartTone = 'stress' | 'amplitude' | 'wind' | 'self-damping' | 'first-end' | 'second-end' | 'flux';
export type ChartMarker = 'none' | 'circle' | 'triangle';

export interface ChartPoint {
  readonly x: number;
  /** Null where the engine gives no number; the line is broken there. */
  readonly y: number | null;
}

export interface ChartSeries {
  readonly key: string;
  readonly label: string;
  readonly tone: ChartTone;
  readonly marker: ChartMarker;
  readonly isDashed?: boolean;
  /** `stacked` series are piled up and filled; lines are drawn over them. */
  readonly isStacked?: boolean;
  readonly points: readonly ChartPoint[];
}

export interface ChartAxis {
  readonly label: string;
  readonly unit: string;
  readonly lower?: number;
  readonly upper?: number;
  /** Text of a number of this axis, without the unit. */
  readonly format: (value: number) => string;
}

/** A second scale along the same x, proportional to it. */
export interface ProportionalAxis extends ChartAxis {
  readonly perX: number;
}

export interface ChartLimit {
  readonly label: string;
  readonly y: number;
}

/** A stretch of x that holds no curve, and why. */
export interface ChartGap {
  readonly fromX: number;
  readonly toX: number;
  readonly reason: string;
}

export interface ChartModel {
  readonly title: string;
  /** One sentence that says what the chart shows, for those who cannot see it. */
  readonly summary: string;
  /** Stem of exported file names, kebab-case. */
  readonly fileStem: string;
  readonly xAxis: ChartAxis;
  readonly secondXAxis?: ProportionalAxis;
  readonly yAxis: ChartAxis;
  readonly series: readonly ChartSeries[];
  readonly limits: readonly ChartLimit[];
  readonly gaps: readonly ChartGap[];
}

/** With up to this many lines each is named beside it; more of them get a key below the chart. */
const directLabelMaxCount = 3;

/** True when the lines are named in the plot rather than in a key. */
export function hasDirectLabels(model: ChartModel): boolean {
  return model.series.length <= directLabelMaxCount && model.series.every((series) => series.isStacked !== true);
}

/** Lower and upper x of everything in the chart; null when there is nothing. */
export function xExtent(model: ChartModel): readonly [number, number] | null {
  const xs = [
    ...model.series.flatMap((series) => series.points.map((point) => point.x)),
    ...model.gaps.flatMap((gap) => [gap.fromX, gap.toX]),
  ];
  if (xs.length === 0) return null;
  const lower = model.xAxis.lower ?? xs.reduce((least, x) => Math.min(least, x));
  const upper = model.xAxis.upper ?? xs.reduce((most, x) => Math.max(most, x));
  return [lower, upper];
}
