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

  it('gives each damper its own dimension, planned above the wire, as built below, nearest closest to it', () => {
    const { marks, wireY } = spanEndLayout('from', [{ ...planned, id: 'far', distanceM: 3 }, planned, built]);
    const offset = new Map(marks.map((mark) => [mark.id, mark.dimensionY - wireY]));
    expect(offset.get('p')).toBeLessThan(0);
    expect(offset.get('far')).toBeLessThan(offset.get('p') ?? 0);
    expect(offset.get('b')).toBeGreaterThan(0);
  });

  it('grows with the number of dimensions, so that none leaves the drawing', () => {
    const many = Array.from({ length: 8 }, (_, index) => ({
      id: String(index),
      distanceM: index + 1,
      isAsBuilt: false,
    }));
    const { marks } = spanEndLayout('from', many);
    expect(Math.min(...marks.map((mark) => mark.dimensionY))).toBeGreaterThan(30);
  });

  it('shows two metres and a scale when nothing is fitted', () => {
    const { ticks, marks } = spanEndLayout('from', []);
    expect(marks).toEqual([]);
    expect(ticks.at(-1)?.distanceM).toBe(2);
  });
});
