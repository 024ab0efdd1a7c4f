import { describe, expect, it } from 'vitest';
import { aChart } from './a-chart.ts';
import { chartCsv } from './chart-csv.ts';
import { readableTable } from './chart-table.ts';

describe('readableTable', () => {
  it('has the x, the second x and one column a series, with units in the heads', () => {
    const format = (value: number) => String(value);
    const model = aChart({ secondXAxis: { label: 'Frequency', unit: 'Hz', perX: 10, format } });
    expect(readableTable(model)).toEqual({
      heads: ['Wind speed, m/s', 'Frequency, Hz', 'Structure 1, clamp, MPa'],
      rows: [
        ['1', '10', '10'],
        ['2', '20', '–'],
        ['3', '30', '5'],
      ],
    });
  });

  it('joins series of different x in order', () => {
    const [series] = aChart().series;
    const other = series === undefined ? [] : [{ ...series, key: 'other', points: [{ x: 2.5, y: 7 }] }];
    const { rows } = readableTable(aChart({ series: [...aChart().series, ...other] }));
    expect(rows.map((row) => row[0])).toEqual(['1', '2', '2.5', '3']);
    expect(rows[2]).toEqual(['2.5', '–', '7']);
  });
});

describe('chartCsv', () => {
  it('quotes cells that hold a comma and leaves cells without a number empty', () => {
    expect(chartCsv(aChart())).toBe('"Wind speed, m/s","Structure 1, clamp, MPa"\r\n1,10\r\n2,\r\n3,5\r\n');
  });
});
