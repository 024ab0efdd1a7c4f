import type { ChartAxis, ChartModel, ChartSeries } from '#src/components/chart/chart-model.ts';
import type { ChartScale } from '#src/components/chart/chart-scale.ts';
import { quantityText } from '#src/components/chart/chart-scale.ts';
import type { VibrationSource } from './vibration-source.ts';
import { fileStem } from './vibration-source.ts';

type Profile = NonNullable<VibrationSource['series']['profile']>;

const positionAxis = ({ scales, structureNames }: VibrationSource): ChartAxis => ({
  label: `Distance from structure ${structureNames[0]}`,
  unit: scales.position.unit,
  format: scales.position.format,
});

function along(
  profile: Profile,
  values: readonly number[],
  scales: { x: ChartScale; y: ChartScale },
): ChartSeries['points'] {
  return profile.positionsM.map((positionM, index) => {
    const value = values[index];
    return { x: scales.x.shown(positionM), y: value === undefined ? null : scales.y.shown(value) };
  });
}

/** Net energy flux of the travelling waves along the span; null when the finding has no profile. */
export function fluxChart(source: VibrationSource): ChartModel | null {
  const { profile } = source.series;
  const { scales, structureNames } = source;
  if (profile === null) return null;
  return {
    title: `Energy flux along the span at ${quantityText(scales.frequency, profile.frequencyHz)}`,
    summary: `Net energy flux towards structure ${structureNames[1]} along span ${source.spanLabel}; below zero it runs towards structure ${structureNames[0]}.`,
    fileStem: fileStem(source, 'energy flux'),
    xAxis: positionAxis(source),
    yAxis: { label: `Flux towards ${structureNames[1]}`, unit: scales.power.unit, format: scales.power.format },
    series: [
      {
        key: 'flux',
        label: 'Energy flux',
        tone: 'flux',
        marker: 'none',
        points: along(profile, profile.fluxesW, { x: scales.position, y: scales.power }),
      },
    ],
    limits: [],
    gaps: [],
  };
}

/** Antinode amplitude along the span; null when the finding has no profile. */
export function envelopeChart(source: VibrationSource): ChartModel | null {
  const { profile } = source.series;
  const { scales } = source;
  if (profile === null) return null;
  return {
    title: `Amplitude along the span at ${quantityText(scales.frequency, profile.frequencyHz)}`,
    summary: `Antinode amplitude along span ${source.spanLabel}, from structure ${source.structureNames[0]} to structure ${source.structureNames[1]}.`,
    fileStem: fileStem(source, 'amplitude envelope'),
    xAxis: positionAxis(source),
    yAxis: {
      label: 'Antinode amplitude, zero to peak',
      unit: scales.amplitude.unit,
      format: scales.amplitude.format,
      lower: 0,
    },
    series: [
      {
        key: 'envelope',
        label: 'Antinode amplitude',
        tone: 'amplitude',
        marker: 'none',
        points: along(profile, profile.amplitudesM, { x: scales.position, y: scales.amplitude }),
      },
    ],
    limits: [],
    gaps: [],
  };
}
