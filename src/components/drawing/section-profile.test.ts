import { describe, expect, it } from 'vitest';
import { aSection, anId } from './a-section.ts';
import { sectionProfile, wirePathKey } from './section-profile.ts';

function pointsOf(path: string | undefined): { x: number; y: number }[] {
  return (path ?? '')
    .slice(1)
    .split('L')
    .map((pair) => {
      const [x = NaN, y = NaN] = pair.split(' ').map(Number);
      return { x, y };
    });
}

describe('sectionProfile', () => {
  const profile = sectionProfile(aSection(), 800);

  it('draws lengths in one scale', () => {
    const [first, second] = profile.spans;
    expect((first?.toX ?? 0) - (first?.fromX ?? 0)).toBeCloseTo((second?.toX ?? 0) - (second?.fromX ?? 0), 6);
    expect(profile.width).toBe(800);
  });

  it('exaggerates heights by exactly the factor it states', () => {
    const [structure] = profile.structures;
    const pxPerM = ((profile.structures[1]?.x ?? 0) - (structure?.x ?? 0)) / 350;
    expect(((structure?.footY ?? 0) - (structure?.topY ?? 0)) / 24).toBeCloseTo(pxPerM * profile.exaggerationRatio, 6);
    expect(profile.exaggerationRatio).toBeGreaterThan(1);
  });

  it('hangs a wire from attachment to attachment, lowest at mid-span when level', () => {
    const points = pointsOf(profile.wirePaths.get(wirePathKey(anId(21), anId(31))));
    const [structure] = profile.structures;
    expect(points[0]?.y).toBeCloseTo(structure?.topY ?? 0, 0);
    expect(points.at(-1)?.y).toBeCloseTo(structure?.topY ?? 0, 0);
    const lowest = points.reduce((best, point) => (point.y > best.y ? point : best));
    expect(lowest).toBe(points[12]);
  });

  it('hangs a tighter wire higher', () => {
    const section = aSection();
    const [wire] = section.wires;
    const tight = aSection({ wires: wire === undefined ? [] : [{ ...wire, tensionN: wire.tensionN * 2 }] });
    const middle = (of: typeof section) =>
      pointsOf(sectionProfile(of, 800).wirePaths.get(wirePathKey(anId(21), anId(31))))[12]?.y ?? NaN;
    expect(middle(tight)).toBeLessThan(middle(section));
  });

  it('grows beyond its box rather than squeeze many spans', () => {
    const span = aSection().spans[0];
    const many =
      span === undefined ? [] : Array.from({ length: 40 }, (_, index) => ({ ...span, id: anId(1000 + index) }));
    expect(sectionProfile(aSection({ spans: many }), 800).width).toBeGreaterThan(2400);
  });

  it('keeps wires that hang below the lowest foot inside the drawing', () => {
    const section = aSection();
    const valley = aSection({ structures: section.structures.map((one) => ({ ...one, structureHeightM: 4 })) });
    const drawn = sectionProfile(valley, 800);
    const ys = pointsOf(drawn.wirePaths.get(wirePathKey(anId(21), anId(31)))).map((point) => point.y);
    expect(Math.max(...ys)).toBeLessThanOrEqual(drawn.height);
  });
});
