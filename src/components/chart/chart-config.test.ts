import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { aChart } from './a-chart.ts';
import { chartData, chartOptions } from './chart-config.ts';
import type { ChartPalette } from './chart-palette.ts';
import { withAlpha } from './chart-palette.ts';

const tickHolder = z.object({
  ticks: z.object({ callback: z.custom<(value: number) => string>((candidate) => typeof candidate === 'function') }),
});

const palette: ChartPalette = {
  paper: '#ffffff',
  ink: '#000000',
  quiet: '#888888',
  limit: '#cc0000',
  tones: {
    stress: '#010101',
    amplitude: '#020202',
    wind: '#030303',
    'self-damping': '#040404',
    'first-end': '#050505',
    'second-end': '#060606',
    flux: '#070707',
  },
};

/** Calls the tick callback of a scale the way Chart.js does. */
function tickText(scale: unknown, value: number): unknown {
  const { ticks } = tickHolder.parse(scale);
  return ticks.callback(value);
}

describe('chartData', () => {
  it('breaks a line where there is no number', () => {
    const [dataset] = chartData(aChart(), palette).datasets;
    expect(dataset?.data[1]).toEqual({ x: 2, y: null });
    expect(dataset?.spanGaps).toBe(false);
  });

  it('piles stacked series on the one before and keeps lines apart from the pile', () => {
    const [series] = aChart().series;
    if (series === undefined) throw new Error('the builder made no series');
    const model = aChart({
      series: [
        { ...series, key: 'wind', isStacked: false },
        { ...series, key: 'self', isStacked: true },
        { ...series, key: 'end', isStacked: true },
      ],
    });
    const { datasets } = chartData(model, palette);
    expect(datasets.map((dataset) => dataset.fill)).toEqual([false, 'origin', '-1']);
    expect(datasets.map((dataset) => dataset.stack)).toEqual(['wind', 'pile', 'pile']);
  });
});

describe('chartOptions', () => {
  it('keeps the second axis in step with the first', () => {
    const second = { label: 'Frequency', unit: 'Hz', perX: 6.5, format: String };
    const { scales } = chartOptions(aChart({ secondXAxis: second }), palette);
    expect(scales?.['x']).toMatchObject({ min: 1, max: 3 });
    expect(scales?.['secondX']).toMatchObject({ min: 6.5, max: 19.5 });
  });

  it('writes ticks without zeros at their end, and leaves the zeros of whole numbers', () => {
    const format = (value: number) => `${value}.00`;
    const { scales } = chartOptions(aChart({ xAxis: { label: 'x', unit: '', format } }), palette);
    expect(tickText(scales?.['x'], 200)).toBe('200');
  });

  it('makes room for a limit above the curves', () => {
    const { scales } = chartOptions(aChart({ limits: [{ label: 'Limit', y: 40 }] }), palette);
    expect(scales?.['y']).toMatchObject({ suggestedMax: 44 });
  });
});

describe('withAlpha', () => {
  it('turns six hex digits into a colour with opacity and leaves others alone', () => {
    expect(withAlpha('#C2541A', 0.5)).toBe('rgba(194, 84, 26, 0.5)');
    expect(withAlpha('rebeccapurple', 0.5)).toBe('rebeccapurple');
  });
});
