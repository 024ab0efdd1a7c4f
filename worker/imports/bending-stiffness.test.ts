import { describe, expect, it } from 'vitest';
import { bendingStiffnessMaxNm2, bendingStiffnessMinNm2, layerCounts, type Stranding } from './bending-stiffness.ts';

/** 795 kcmil 26/7: strand diameter from the area in circular mil, steel strand 3.4544 mm, moduli 69 and 200 GPa. */
const stranding795: Stranding = {
  core: { strandCount: 7, strandDiameterM: 3.4544e-3, modulusPa: 200e9 },
  outer: { strandCount: 26, strandDiameterM: Math.sqrt(795_000 / 26) * 25.4e-6, modulusPa: 69e9 },
  outerLayerCount: 2,
};

describe('bending stiffness of 795 kcmil 26/7', () => {
  it('is 44.055 N·m² when strands slip', () => {
    expect(bendingStiffnessMinNm2(stranding795)).toBeCloseTo(44.055, 2);
  });
  it('is 1603.75 N·m² when they do not', () => {
    // Printed to 0.01; the strand diameter from the area is good to 1e-5, so 0.05 leaves room for its fourth power.
    expect(bendingStiffnessMaxNm2(stranding795)).toBeGreaterThan(1603.7);
    expect(bendingStiffnessMaxNm2(stranding795)).toBeLessThan(1603.8);
  });
});

describe('stranding', () => {
  it.each([
    [26, 2, [10, 16]],
    [54, 3, [12, 18, 24]],
    [6, 1, [6]],
    [84, 4, [12, 18, 24, 30]],
  ])('%i strands in %i layers', (strandCount, layerCount, counts) => {
    expect(layerCounts(strandCount, layerCount)).toEqual(counts);
  });
  it('is unknown when the strands do not fill their layers', () => {
    expect(layerCounts(27, 2)).toBeNull();
    const uneven = { ...stranding795, outer: { ...stranding795.outer, strandCount: 27 } };
    expect(bendingStiffnessMaxNm2(uneven)).toBeNull();
  });
  it('approaches the solid rod of the same metal as it is divided ever finer', () => {
    // Many strands without slip: E·A·R²/4 with the area of the strands and the radius of the bundle.
    const group = { strandCount: 127, strandDiameterM: 0.002, modulusPa: 69e9 };
    const solidNm2 = (group.modulusPa * 127 * Math.PI * 0.001 ** 2 * 0.013 ** 2) / 4;
    const foundNm2 = bendingStiffnessMaxNm2({ core: null, outer: group, outerLayerCount: 6 }) ?? 0;
    expect(foundNm2 / solidNm2).toBeGreaterThan(0.8);
    expect(foundNm2 / solidNm2).toBeLessThan(1.05);
  });
  it('with one strand gives the strand itself either way', () => {
    const one: Stranding = {
      core: null,
      outer: { strandCount: 1, strandDiameterM: 0.004, modulusPa: 69e9 },
      outerLayerCount: 0,
    };
    expect(bendingStiffnessMaxNm2(one)).toBeCloseTo(bendingStiffnessMinNm2(one), 12);
  });
});
