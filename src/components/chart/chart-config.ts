import type { ChartData, ChartDataset, ChartOptions, ScaleOptionsByType } from 'chart.js';
import type { ChartAxis, ChartModel, ChartSeries } from './chart-model.ts';
import { xExtent } from './chart-model.ts';
import { withoutEndZeros } from './chart-scale.ts';
import type { ChartPalette } from './chart-palette.ts';
import { withAlpha } from './chart-palette.ts';

const stackFillAlpha = 0.28;
const markerEveryCount = 8;
const markerShiftCount = 3;
const axisFont = { family: 'Roboto, sans-serif', size: 12 };

function datasetOf(series: ChartSeries, index: number, context: DatasetContext): ChartDataset<'line'> {
  const colour = context.palette.tones[series.tone];
  const isFirstOfStack = !context.model.series.slice(0, index).some((earlier) => earlier.isStacked);
  return {
    label: series.label,
    data: series.points.map(({ x, y }) => ({ x, y })),
    parsing: false,
    borderColor: colour,
    backgroundColor: series.isStacked ? withAlpha(colour, stackFillAlpha) : colour,
    borderWidth: series.isStacked ? 1 : 2,
    borderDash: series.isDashed ? [7, 5] : [],
    pointStyle: series.marker === 'triangle' ? 'triangle' : 'circle',
    // Few enough markers to tell the lines apart, not so many that they hide them.
    // Each series starts elsewhere, so that one line does not hide another that runs along it.
    pointRadius: series.points.map((_, row) =>
      series.marker !== 'none' && (row + index * markerShiftCount) % markerEveryCount === 0 ? 4 : 0,
    ),
    pointHoverRadius: 5,
    fill: series.isStacked ? (isFirstOfStack ? 'origin' : '-1') : false,
    stack: series.isStacked ? 'pile' : series.key,
    order: series.isStacked ? 1 : 0,
    tension: 0,
    spanGaps: false,
  };
}

interface DatasetContext {
  readonly model: ChartModel;
  readonly palette: ChartPalette;
}

/** Data of a chart as Chart.js takes it. */
export function chartData(model: ChartModel, palette: ChartPalette): ChartData<'line'> {
  return { datasets: model.series.map((series, index) => datasetOf(series, index, { model, palette })) };
}

function scaleOf(axis: ChartAxis, palette: ChartPalette) {
  return {
    type: 'linear' as const,
    title: {
      display: true,
      text: axis.unit === '' ? axis.label : `${axis.label}, ${axis.unit}`,
      color: palette.ink,
      font: axisFont,
    },
    ticks: {
      color: palette.ink,
      font: axisFont,
      maxTicksLimit: 8,
      maxRotation: 0,
      // The ends of a wind band are odd numbers that crowd the round ones.
      includeBounds: false,
      callback: (value: string | number) => withoutEndZeros(axis.format(Number(value))),
    },
    grid: { color: withAlpha(palette.quiet, 0.25), tickColor: palette.quiet },
    border: { color: palette.quiet },
  } satisfies Partial<Record<keyof ScaleOptionsByType<'linear'>, unknown>>;
}

/** The limits belong in the picture even when every curve stays far below them. */
function highestLimit(model: ChartModel): number | undefined {
  return model.limits.length === 0 ? undefined : Math.max(...model.limits.map((limit) => limit.y)) * 1.1;
}

function scalesOf(model: ChartModel, palette: ChartPalette): NonNullable<ChartOptions<'line'>['scales']> {
  const [lower, upper] = xExtent(model) ?? [0, 1];
  const highest = highestLimit(model);
  const second = model.secondXAxis;
  const isStacked = model.series.some((series) => series.isStacked);
  return {
    x: { ...scaleOf(model.xAxis, palette), min: lower, max: upper },
    y: {
      ...scaleOf(model.yAxis, palette),
      stacked: isStacked,
      ...(model.yAxis.lower === undefined ? {} : { min: model.yAxis.lower }),
      ...(model.yAxis.upper === undefined ? {} : { max: model.yAxis.upper }),
      ...(highest === undefined ? {} : { suggestedMax: highest }),
    },
    ...(second === undefined
      ? {}
      : {
          secondX: {
            ...scaleOf(second, palette),
            axis: 'x' as const,
            position: 'top' as const,
            min: lower * second.perX,
            max: upper * second.perX,
            grid: { drawOnChartArea: false, tickColor: palette.quiet },
          },
        }),
  };
}

/** Options of a chart as Chart.js takes them. */
export function chartOptions(model: ChartModel, palette: ChartPalette): ChartOptions<'line'> {
  const { xAxis, secondXAxis, yAxis } = model;
  return {
    responsive: true,
    maintainAspectRatio: false,
    animation: false,
    normalized: true,
    interaction: { mode: 'index', intersect: false },
    scales: scalesOf(model, palette),
    plugins: {
      legend: { display: false },
      tooltip: {
        callbacks: {
          title: ([item]) => {
            const x = item?.parsed.x;
            if (x === undefined || x === null) return '';
            const first = `${xAxis.format(x)} ${xAxis.unit}`;
            return secondXAxis === undefined
              ? first
              : `${first}, ${secondXAxis.format(x * secondXAxis.perX)} ${secondXAxis.unit}`;
          },
          label: ({ dataset, parsed }) =>
            parsed.y === null ? '' : `${dataset.label ?? ''}: ${yAxis.format(parsed.y)} ${yAxis.unit}`,
        },
      },
    },
  };
}
