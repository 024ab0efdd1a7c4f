import type { FindingSeries } from '#shared/contract/findings.ts';
import type { ChartAxis, ChartGap, ChartLimit, ChartModel, ChartSeries } from '#src/components/chart/chart-model.ts';
import type { ChartScale } from '#src/components/chart/chart-scale.ts';
import { quantityText } from '#src/components/chart/chart-scale.ts';
import { rangesWhere } from './series-gaps.ts';
import type { VibrationSource } from './vibration-source.ts';
import { fileStem } from './vibration-source.ts';

type Row = FindingSeries['rows'][number];

const axis = (label: string, scale: ChartScale, bounds: { lower?: number; upper?: number } = {}): ChartAxis => ({
  label,
  unit: scale.unit,
  format: scale.format,
  ...bounds,
});

function windAxes({ series, scales }: VibrationSource): Pick<ChartModel, 'xAxis' | 'secondXAxis'> {
  const xAxis = axis('Wind speed across the span', scales.windSpeed);
  const last = series.rows.at(-1);
  if (last === undefined || last.windSpeedMPerS <= 0) return { xAxis };
  // Shedding frequency is proportional to wind speed for one wire, so one row gives the second scale.
  const perX = scales.frequency.shown(last.frequencyHz) / scales.windSpeed.shown(last.windSpeedMPerS);
  return { xAxis, secondXAxis: { ...axis('Frequency', scales.frequency), perX } };
}

type SeriesLook = Pick<ChartSeries, 'key' | 'label' | 'tone' | 'marker'>;

function endLook({ structureNames }: VibrationSource, end: 0 | 1): SeriesLook {
  return {
    key: end === 0 ? 'first-end' : 'second-end',
    label: `Structure ${structureNames[end]}`,
    tone: end === 0 ? 'first-end' : 'second-end',
    marker: end === 0 ? 'circle' : 'triangle',
  };
}

function overWind(
  source: VibrationSource,
  scale: ChartScale,
  valueOf: (row: Row) => number | null,
): ChartSeries['points'] {
  return source.series.rows.map((row) => {
    const value = valueOf(row);
    return {
      x: source.scales.windSpeed.shown(row.windSpeedMPerS),
      y: value === null ? null : scale.shown(value),
    };
  });
}

interface GapRule {
  readonly toX: (row: Row) => number;
  readonly holds: (row: Row) => boolean;
  readonly reason: (from: string, to: string) => string;
}

const noDamperData = (from: string, to: string) => `no damper data ${from} to ${to}`;

function gapsOf({ series, scales }: VibrationSource, rule: GapRule): ChartGap[] {
  return rangesWhere(series.rows, rule.holds).map(({ first, last, before, after }) => ({
    fromX: rule.toX(before),
    toX: rule.toX(after),
    reason: rule.reason(
      quantityText(scales.frequency, first.frequencyHz),
      quantityText(scales.frequency, last.frequencyHz),
    ),
  }));
}

const windGaps = (source: VibrationSource) =>
  gapsOf(source, {
    toX: (row) => source.scales.windSpeed.shown(row.windSpeedMPerS),
    holds: (row) => row.outcome === 'no-damper-data',
    reason: noDamperData,
  });

/** At its amplitude limit the wire has no balance that closes: the wind could drive it further. */
const unbalancedGaps = (source: VibrationSource) =>
  gapsOf(source, {
    toX: (row) => source.scales.windSpeed.shown(row.windSpeedMPerS),
    holds: (row) => row.outcome === 'amplitude-limit',
    reason: () => 'amplitude at its limit: no balance',
  });

const place = ({ spanLabel, wireName }: VibrationSource) => `span ${spanLabel}, wire ${wireName}`;

function highestRow(rows: readonly Row[], valueOf: (row: Row) => number | null): { row: Row; value: number } | null {
  return rows.reduce<{ row: Row; value: number } | null>((best, row) => {
    const value = valueOf(row);
    return value !== null && (best === null || value > best.value) ? { row, value } : best;
  }, null);
}

const clampStressPa = (row: Row): number | null => {
  const stressesPa = row.clampStressPa.filter((stressPa) => stressPa !== null);
  return stressesPa.length === 0 ? null : Math.max(...stressesPa);
};

/** Only a damper takes anything out of a wave at an end. */
const lossless = 0.9999;
const hasDampers = (rows: readonly Row[]) =>
  rows.some((row) => row.reflectionRatio.some((ratio) => ratio === null || ratio < lossless));

function stressLimits({ series, scales }: VibrationSource): ChartLimit[] {
  const limit = (text: string, stressPa: number | null): ChartLimit[] =>
    stressPa === null
      ? []
      : [{ label: `${text} ${quantityText(scales.stress, stressPa)}`, y: scales.stress.shown(stressPa) }];
  return [
    ...limit('Limit', series.limitStressPa),
    ...limit('Limit where dampers are fitted', hasDampers(series.rows) ? series.damperedLimitStressPa : null),
  ];
}

/** Bending stress at both clamps against wind speed, with the limits. */
export function stressChart(source: VibrationSource): ChartModel {
  const { scales, series } = source;
  const worst = highestRow(series.rows, clampStressPa);
  const limitText = series.limitStressPa === null ? '' : `; limit ${quantityText(scales.stress, series.limitStressPa)}`;
  return {
    title: 'Bending stress at the clamps',
    summary:
      worst === null
        ? `No clamp stress for ${place(source)}.`
        : `Clamp stress against wind speed, ${place(source)}: highest ${quantityText(scales.stress, worst.value)} at ${quantityText(scales.windSpeed, worst.row.windSpeedMPerS)}, ${quantityText(scales.frequency, worst.row.frequencyHz)}${limitText}.`,
    fileStem: fileStem(source, 'clamp stress'),
    ...windAxes(source),
    yAxis: axis('Stress, zero to peak', scales.stress, { lower: 0 }),
    series: ([0, 1] as const).map((end) => ({
      ...endLook(source, end),
      points: overWind(source, scales.stress, (row) => row.clampStressPa[end]),
    })),
    limits: stressLimits(source),
    gaps: windGaps(source),
  };
}

/** Antinode amplitude at mid-span against wind speed. */
export function amplitudeChart(source: VibrationSource): ChartModel {
  const { scales, series } = source;
  const worst = highestRow(series.rows, (row) => row.midAmplitudeM);
  return {
    title: 'Amplitude at mid-span',
    summary:
      worst === null
        ? `No amplitude for ${place(source)}.`
        : `Amplitude against wind speed, ${place(source)}: highest ${quantityText(scales.amplitude, worst.value)} at ${quantityText(scales.windSpeed, worst.row.windSpeedMPerS)}.`,
    fileStem: fileStem(source, 'amplitude'),
    ...windAxes(source),
    yAxis: axis('Antinode amplitude, zero to peak', scales.amplitude, { lower: 0 }),
    series: [
      {
        key: 'amplitude',
        label: 'Mid-span',
        tone: 'amplitude',
        marker: 'none',
        points: overWind(source, scales.amplitude, (row) => row.midAmplitudeM),
      },
    ],
    limits: [],
    gaps: windGaps(source),
  };
}

/** Wind power as a line over what takes it: self-damping and the two ends, piled up. */
export function energyChart(source: VibrationSource): ChartModel {
  const { scales } = source;
  const worst = highestRow(source.series.rows, (row) => row.windPowerW);
  const taken = ([0, 1] as const).map((end): ChartSeries => {
    const look = endLook(source, end);
    const points = overWind(source, scales.power, (row) => row.endPowerW[end]);
    return { ...look, label: `Into ${look.label.toLowerCase()}`, isStacked: true, points };
  });
  return {
    title: 'Where the wind’s energy goes',
    summary:
      worst === null
        ? `No energy balance for ${place(source)}.`
        : `Wind power in against self-damping and both ends, ${place(source)}: highest ${quantityText(scales.power, worst.value)} at ${quantityText(scales.windSpeed, worst.row.windSpeedMPerS)}.`,
    fileStem: fileStem(source, 'energy'),
    ...windAxes(source),
    yAxis: axis('Power', scales.power, { lower: 0 }),
    series: [
      {
        key: 'self-damping',
        label: 'Self-damping of the wire',
        tone: 'self-damping',
        marker: 'none',
        isStacked: true,
        points: overWind(source, scales.power, (row) => row.selfDampingPowerW),
      },
      ...taken,
      {
        key: 'wind',
        label: 'Wind in',
        tone: 'wind',
        marker: 'none',
        isDashed: true,
        points: overWind(source, scales.power, (row) => row.windPowerW),
      },
    ],
    limits: [],
    gaps: [...windGaps(source), ...unbalancedGaps(source)],
  };
}

/** A little above 1, so that the line of an end without dampers is not cut in half. */
const reflectionShownMost = 1.05;

/** Size of the reflected wave at both ends against frequency. */
export function reflectionChart(source: VibrationSource): ChartModel {
  const { scales, series } = source;
  const toX = (row: Row) => scales.frequency.shown(row.frequencyHz);
  return {
    title: 'Reflection at the ends',
    summary: `Share of a wave’s amplitude that comes back from each end against frequency, ${place(source)}; 1 means that the end takes nothing.`,
    fileStem: fileStem(source, 'reflection'),
    xAxis: axis('Frequency', scales.frequency),
    yAxis: axis('Reflected amplitude over arriving', scales.ratio, { lower: 0, upper: reflectionShownMost }),
    series: ([0, 1] as const).map((end) => ({
      ...endLook(source, end),
      points: series.rows.map((row) => ({ x: toX(row), y: row.reflectionRatio[end] })),
    })),
    limits: [],
    gaps: gapsOf(source, {
      toX,
      holds: (row) => row.reflectionRatio.every((ratio) => ratio === null),
      reason: noDamperData,
    }),
  };
}
