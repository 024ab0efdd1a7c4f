import type { FindingSeries } from '#shared/contract/findings.ts';
import type { ChartScale } from '#src/components/chart/chart-scale.ts';

/** The scales of all quantities that the charts of a finding use. */
export interface ChartScales {
  readonly stress: ChartScale;
  readonly amplitude: ChartScale;
  readonly windSpeed: ChartScale;
  readonly frequency: ChartScale;
  readonly power: ChartScale;
  readonly position: ChartScale;
  readonly ratio: ChartScale;
}

/** What the charts of one finding are made from. */
export interface VibrationSource {
  readonly series: FindingSeries;
  /** Names of the first and the second structure of the span. */
  readonly structureNames: readonly [string, string];
  readonly spanLabel: string;
  readonly wireName: string;
  readonly scales: ChartScales;
}

/** Stem of the files a chart is exported to: its subject, span and wire. */
export function fileStem(source: VibrationSource, subject: string): string {
  return `${subject} ${source.spanLabel} ${source.wireName}`
    .toLowerCase()
    .replaceAll(/[^a-z0-9]+/g, '-')
    .replaceAll(/^-|-$/g, '');
}
