import { describe, expect, it } from 'vitest';
import { aSeriesRow, aVibrationSource } from './a-finding.ts';
import { envelopeChart, fluxChart } from './profile-charts.ts';
import { amplitudeChart, energyChart, reflectionChart, stressChart } from './vibration-charts.ts';

const withoutData = {
  outcome: 'no-damper-data',
  midAmplitudeM: null,
  clampStressPa: [null, null],
  reflectionRatio: [1, null],
  windPowerW: null,
  selfDampingPowerW: null,
  endPowerW: [null, null],
} as const satisfies Partial<ReturnType<typeof aSeriesRow>>;

describe('stressChart', () => {
  it('shows both clamps in the unit of the reader, the limit, and the frequency in step with the wind', () => {
    const chart = stressChart(aVibrationSource());
    expect(chart.series.map((series) => series.points)).toEqual([[{ x: 3, y: 20 }], [{ x: 3, y: 30 }]]);
    expect(chart.limits).toEqual([{ label: 'Limit 22\u2009MPa', y: 22 }]);
    expect(chart.secondXAxis?.perX).toBeCloseTo(20 / 3, 9);
  });

  it('says the worst in one sentence', () => {
    expect(stressChart(aVibrationSource()).summary).toContain(
      'highest 30\u2009MPa at 3\u2009m/s, 20\u2009Hz; limit 22',
    );
    expect(stressChart(aVibrationSource({ rows: [] })).summary).toContain('No clamp stress');
  });

  it('tells the ends apart by marker', () => {
    expect(stressChart(aVibrationSource()).series.map((series) => series.marker)).toEqual(['circle', 'triangle']);
  });

  it('says why a stretch is empty, one gap a run of rows', () => {
    const rows = [
      aSeriesRow({ windSpeedMPerS: 1, frequencyHz: 7 }),
      aSeriesRow({ ...withoutData, windSpeedMPerS: 2, frequencyHz: 14 }),
      aSeriesRow({ ...withoutData, windSpeedMPerS: 3, frequencyHz: 21 }),
      aSeriesRow({ windSpeedMPerS: 4, frequencyHz: 28 }),
      aSeriesRow({ ...withoutData, windSpeedMPerS: 5, frequencyHz: 35 }),
    ];
    const { gaps } = stressChart(aVibrationSource({ rows }));
    expect(gaps.map(({ fromX, toX }) => [fromX, toX])).toEqual([
      [1, 4],
      [4, 5],
    ]);
    expect(gaps[0]?.reason).toBe('no damper data 14\u2009Hz to 21\u2009Hz');
  });
});

describe('energyChart', () => {
  it('piles up what takes energy and keeps the wind as a line, so that the balance closes in sight', () => {
    const chart = energyChart(aVibrationSource());
    const piled = chart.series.filter((series) => series.isStacked);
    expect(piled.map((series) => series.key)).toEqual(['self-damping', 'first-end', 'second-end']);
    const total = piled.reduce((sum, series) => sum + (series.points[0]?.y ?? 0), 0);
    expect(total).toBeCloseTo(chart.series.find((series) => series.key === 'wind')?.points[0]?.y ?? NaN, 9);
  });
});

describe('what the wire or its ends lack', () => {
  it('shows the limit of damper clamps only where an end has dampers', () => {
    const bare = aSeriesRow({ reflectionRatio: [1, 1] });
    const limitsOf = (row: typeof bare) =>
      stressChart(aVibrationSource({ rows: [row], damperedLimitStressPa: 5e6 })).limits.length;
    expect(limitsOf(bare)).toBe(1);
    expect(limitsOf(aSeriesRow({ reflectionRatio: [1, 0.8] }))).toBe(2);
  });

  it('says why there is no balance at the amplitude limit', () => {
    const limited = aSeriesRow({ outcome: 'amplitude-limit', windPowerW: null, selfDampingPowerW: null });
    expect(energyChart(aVibrationSource({ rows: [limited] })).gaps[0]?.reason).toContain('amplitude at its limit');
  });
});

describe('reflectionChart', () => {
  it('keeps the end that has data where only the other has none', () => {
    const chart = reflectionChart(aVibrationSource({ rows: [aSeriesRow(withoutData)] }));
    expect(chart.series.map((series) => series.points[0]?.y)).toEqual([1, null]);
    expect(chart.gaps).toEqual([]);
  });
});

describe('charts along the span', () => {
  it('need a profile', () => {
    expect(fluxChart(aVibrationSource())).toBeNull();
    expect(envelopeChart(aVibrationSource())).toBeNull();
  });

  it('draw it from the first structure on', () => {
    const profile = { frequencyHz: 20, positionsM: [0, 350], amplitudesM: [0.001, 0.002], fluxesW: [-0.2, 0.6] };
    expect(fluxChart(aVibrationSource({ profile }))?.series[0]?.points).toEqual([
      { x: 0, y: -0.2 },
      { x: 350, y: 0.6 },
    ]);
    expect(envelopeChart(aVibrationSource({ profile }))?.series[0]?.points[1]).toEqual({ x: 350, y: 2 });
  });
});

describe('file names', () => {
  it('hold only what every file system takes', () => {
    expect(amplitudeChart(aVibrationSource()).fileStem).toBe('amplitude-14-15-a');
  });
});
