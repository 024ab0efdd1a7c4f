import { describe, expect, it } from 'vitest';
import { spanEndLayout } from './span-end-layout.ts';

const planned = { id: 'p', distanceM: 1, isAsBuilt: false };
const built = { id: 'b', distanceM: 1.34, isAsBuilt: true };

describe('spanEndLayout', () => {
  it('keeps one scale for all dampers', () => {
    const { clampX, marks } = spanEndLayout('from', [planned, built]);
    const [first, second] = marks;
    expect(((second?.x ?? 0) - clampX) / ((first?.x ?? 0) - clampX)).toBeCloseTo(1.34, 9);
  });

  it('mirrors the second end', () => {
    const from = spanEndLayout('from', [planned]);
    const to = spanEndLayout('to', [planned]);
    expect(to.clampX).toBe(to.width - from.clampX);
    expect(to.marks[0]?.x).toBeCloseTo(from.width - (from.marks[0]?.x ?? 0), 9);
  });

  it('gives each damper of one kind its own dimension row, nearest first', () => {
    const layout = spanEndLayout('from', [{ ...planned, id: 'far', distanceM: 3 }, planned, built]);
    expect(layout.marks.map(({ id, rowIndex }) => [id, rowIndex])).toEqual([
      ['p', 0],
      ['far', 1],
      ['b', 0],
    ]);
  });

  it('shows two metres and a scale when nothing is fitted', () => {
    const { ticks, marks } = spanEndLayout('from', []);
    expect(marks).toEqual([]);
    expect(ticks.at(-1)?.distanceM).toBe(2);
  });
});
