import type { ChartAxis, ChartModel } from './chart-model.ts';

/** The numbers behind a chart as a table: x, the second x if there is one, then one column a series. */
export interface ChartTable {
  readonly heads: readonly string[];
  readonly rows: readonly (readonly string[])[];
}

const head = (axis: ChartAxis, label = axis.label) => (axis.unit === '' ? label : `${label}, ${axis.unit}`);

/**
 * Rows for reading and for export. Series of one chart may have different x; each x that occurs makes one row.
 *
 * @param textOf how a number is written: rounded for reading, in full for export
 * @param emptyText what stands where a series has no number
 */
export function chartTable(
  model: ChartModel,
  textOf: (value: number, axis: ChartAxis) => string,
  emptyText: string,
): ChartTable {
  const columns = model.series.map((series) => new Map(series.points.map((point) => [point.x, point.y])));
  const xs = [...new Set(columns.flatMap((column) => [...column.keys()]))].sort((one, other) => one - other);
  const second = model.secondXAxis;
  return {
    heads: [
      head(model.xAxis),
      ...(second === undefined ? [] : [head(second)]),
      ...model.series.map((series) => head(model.yAxis, series.label)),
    ],
    rows: xs.map((x) => [
      textOf(x, model.xAxis),
      ...(second === undefined ? [] : [textOf(x * second.perX, second)]),
      ...columns.map((column) => {
        const y = column.get(x);
        return y === undefined || y === null ? emptyText : textOf(y, model.yAxis);
      }),
    ]),
  };
}

/** The table as rounded text, for the screen. */
export function readableTable(model: ChartModel): ChartTable {
  return chartTable(model, (value, axis) => axis.format(value), '–');
}
