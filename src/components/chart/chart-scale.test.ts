import { describe, expect, it } from 'vitest';
import { markText, quantityText, withoutEndZeros } from './chart-scale.ts';

const scale = { unit: 'kN', shown: (value: number) => value / 1000, format: (shown: number) => shown.toFixed(2) };

describe('quantityText', () => {
  it('converts, rounds and names the unit after a thin space; a plain number has none', () => {
    expect(quantityText(scale, 8310)).toBe('8.31\u2009kN');
    expect(quantityText({ ...scale, unit: '' }, 8310)).toBe('8.31');
  });
});

describe('markText', () => {
  it('drops zeros behind the point only', () => {
    expect(markText(scale, 100_000)).toBe('100\u2009kN');
    expect(withoutEndZeros('0.50')).toBe('0.5');
    expect(withoutEndZeros('200')).toBe('200');
  });
});
