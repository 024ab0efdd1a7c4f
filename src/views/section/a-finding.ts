import type { FindingSeries } from '#shared/contract/findings.ts';
import { anId } from '#src/components/drawing/a-section.ts';
import type { ChartScale } from '#src/components/chart/chart-scale.ts';
import type { VibrationSource } from './vibration-source.ts';

/** Test builder: one row of a series; 20 Hz at 3 m/s, steady, with damper data at both ends. */
export function aSeriesRow(overrides: Partial<FindingSeries['rows'][number]> = {}): FindingSeries['rows'][number] {
  return {
    frequencyHz: 20,
    windSpeedMPerS: 3,
    outcome: 'steady',
    midAmplitudeM: 0.002,
    clampStressPa: [20e6, 30e6],
    reflectionRatio: [1, 0.7],
    windPowerW: 1,
    selfDampingPowerW: 0.4,
    endPowerW: [0, 0.6],
    ...overrides,
  };
}

const scale = (unit: string, perSi: number): ChartScale => ({
  unit,
  shown: (value) => value * perSi,
  format: (value) => String(Math.round(value * 100) / 100),
});

/** Test builder: what the charts of a finding are made from. */
export function aVibrationSource(overrides: Partial<FindingSeries> = {}): VibrationSource {
  return {
    series: {
      findingId: anId(51),
      limitStressPa: 22e6,
      limitSource: 'invented for a test',
      damperedLimitStressPa: null,
      rows: [aSeriesRow()],
      profile: null,
      isReproduced: true,
      ...overrides,
    },
    structureNames: ['14', '15'],
    spanLabel: '14–15',
    wireName: 'A',
    scales: {
      stress: scale('MPa', 1e-6),
      amplitude: scale('mm', 1000),
      windSpeed: scale('m/s', 1),
      frequency: scale('Hz', 1),
      power: scale('W', 1),
      position: scale('m', 1),
      ratio: scale('', 1),
    },
  };
}
