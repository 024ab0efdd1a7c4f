import { describe, expect, it } from 'vitest';
import { boxAround } from './box-around.ts';

describe('boxAround', () => {
  it('holds every place with a margin', () => {
    const [west, south, east, north] =
      boxAround([
        [-21, -38.5],
        [-20.5, -38.4],
      ]) ?? expect.unreachable();
    expect([west < -21, south < -38.5, east > -20.5, north > -38.4]).toEqual([true, true, true, true]);
    expect(east - west).toBeLessThan(0.6);
  });

  it('shows the surroundings of a single place', () => {
    const [west, south, east, north] = boxAround([[10, 50]]) ?? expect.unreachable();
    expect(east - west).toBeCloseTo(0.04);
    expect(north - south).toBeCloseTo(0.04);
  });

  it('has nothing to show around nothing', () => expect(boxAround([])).toBeNull());
});
