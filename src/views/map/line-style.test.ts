import { describe, expect, it } from 'vitest';
import { grades } from '#shared/contract/grades.ts';
import { pickedStroke, strokesOf, terrainFill, type MapPalette } from './line-style.ts';

/** Names in place of colours, so that a test tells which one was taken. */
const palette: MapPalette = {
  grades: { calm: 'calm', notice: 'notice', act: 'act', urgent: 'urgent', none: 'none' },
  paper: 'paper',
  ink: 'ink',
  accent: 'accent',
  land: 'land',
  landEdge: 'edge',
  terrain: { open: 'open', sand: 'sand', green: 'green', wood: 'wood' },
};

describe('strokesOf', () => {
  it('tells grades apart without colour: no two share weights and dashes', () => {
    const patterns = [...grades, null].map((grade) =>
      strokesOf({ grade, isStale: false }, palette)
        .map(({ weight, dashArray }) => `${weight}/${String(dashArray ?? 'solid')}`)
        .join(' '),
    );
    expect(new Set(patterns).size).toBe(grades.length + 1);
  });

  it('weighs a worse grade heavier', () => {
    const weights = grades.map((grade) => strokesOf({ grade, isStale: false }, palette)[0]?.weight ?? 0);
    expect(weights).toEqual([...weights].sort((one, other) => one - other));
    expect(new Set(weights).size).toBe(grades.length);
  });

  it('hatches what is stale, and leaves what was never assessed as it is', () => {
    const fresh = strokesOf({ grade: 'act', isStale: false }, palette);
    const stale = strokesOf({ grade: 'act', isStale: true }, palette);
    expect(stale.slice(0, -1)).toEqual(fresh);
    expect(stale.at(-1)).toMatchObject({ color: 'paper' });
    expect(strokesOf({ grade: null, isStale: true }, palette)).toHaveLength(1);
  });

  it('lets a halo show on both sides of the heaviest line', () => {
    const heaviest = Math.max(...grades.map((grade) => strokesOf({ grade, isStale: false }, palette)[0]?.weight ?? 0));
    expect(pickedStroke(palette).weight).toBeGreaterThan(heaviest + 4);
  });
});

describe('terrainFill', () => {
  it.each([
    [0.0002, 'open'],
    [0.01, 'sand'],
    [0.05, 'green'],
    [0.3, 'wood'],
    [1, 'wood'],
  ])('fills a roughness of %s m', (roughnessM, fill) => expect(terrainFill(roughnessM, palette)).toBe(fill));
});
