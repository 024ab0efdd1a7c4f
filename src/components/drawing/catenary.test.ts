import { describe, expect, it } from 'vitest';
import { catenaryHeightM, sagM } from './catenary.ts';

const wire = { tensionN: 27757, massKgPerM: 1.62656, spanLengthM: 350, riseM: 0 };

describe('catenaryHeightM', () => {
  it('passes through both attachments, level or not', () => {
    for (const riseM of [0, 40, -40]) {
      expect(catenaryHeightM({ ...wire, riseM }, 0)).toBeCloseTo(0, 9);
      expect(catenaryHeightM({ ...wire, riseM }, wire.spanLengthM)).toBeCloseTo(riseM, 9);
    }
  });

  it('sags by w·L²/8H for a taut level wire', () => {
    const parabolaM = (wire.massKgPerM * 9.80665 * wire.spanLengthM ** 2) / (8 * wire.tensionN);
    // The catenary is deeper by (w·L/H)²/48 of the sag: 0.084 % here.
    expect(sagM(wire) / parabolaM).toBeCloseTo(1 + (350 / (27757 / (1.62656 * 9.80665))) ** 2 / 48, 5);
  });

  it('is symmetric when the attachments are level', () => {
    expect(catenaryHeightM(wire, 100)).toBeCloseTo(catenaryHeightM(wire, 250), 9);
  });
});
