import type { ChartModel } from './chart-model.ts';

/** Test builder: one line of three points, the second without a number. */
export function aChart(overrides: Partial<ChartModel> = {}): ChartModel {
  const format = (value: number) => String(value);
  return {
    title: 'Stress',
    summary: 'Stress against wind speed.',
    fileStem: 'stress',
    xAxis: { label: 'Wind speed', unit: 'm/s', format },
    yAxis: { label: 'Stress', unit: 'MPa', lower: 0, format },
    series: [
      {
        key: 'first',
        label: 'Structure 1, clamp',
        tone: 'first-end',
        marker: 'circle',
        points: [
          { x: 1, y: 10 },
          { x: 2, y: null },
          { x: 3, y: 5 },
        ],
      },
    ],
    limits: [],
    gaps: [],
    ...overrides,
  };
}
