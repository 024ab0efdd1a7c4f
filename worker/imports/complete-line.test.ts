import { describe, expect, it } from 'vitest';
import { completeLine, rulingSpanM } from './complete-line.ts';
import { geodesicPath, middleBearingDeg, turnDeg } from './geodesic-path.ts';
import { createIssueList } from './issue-list.ts';
import type { LineDraft } from './line-draft.ts';
import { meanWireHeight, sagM } from './mean-wire-height.ts';

const drake = { massKgPerM: 1.6283, tensionN: 28_000 };

describe('rulingSpanM', () => {
  it('agrees with the published example of 100, 150 and 200 m: 165.83 m', () => {
    expect(rulingSpanM([100, 150, 200])).toBeCloseTo(165.83, 2);
  });
  it('is the span itself for equal spans', () => {
    expect(rulingSpanM([350, 350, 350])).toBeCloseTo(350, 9);
  });
});

describe('meanWireHeight', () => {
  it('is two thirds of the sag below the mean attachment height', () => {
    const { heightM } = meanWireHeight({ spanLengthM: 300, fromHeightM: 24, toHeightM: 28, wires: [drake] });
    expect(heightM).toBeCloseTo(26 - (2 / 3) * sagM(300, drake), 9);
    expect(sagM(300, drake)).toBeCloseTo((1.6283 * 9.80665 * 300 ** 2) / (8 * 28_000), 9);
  });
  it('takes the mean attachment height where the wires would touch flat ground', () => {
    expect(meanWireHeight({ spanLengthM: 1500, fromHeightM: 40, toHeightM: 40, wires: [drake] })).toEqual({
      heightM: 40,
      isOverValley: true,
    });
  });
});

describe('geodesicPath', () => {
  it('agrees with the length of a degree of latitude at the equator on WGS84: 110 574.4 m', () => {
    const path = geodesicPath({ longitudeDeg: 0, latitudeDeg: 0 }, { longitudeDeg: 0, latitudeDeg: 1 });
    expect(path.lengthM).toBeCloseTo(110_574.4, 0);
    expect(middleBearingDeg(path)).toBeCloseTo(0, 9);
  });
  it('gives bearings from 0 up to 360', () => {
    const path = geodesicPath({ longitudeDeg: 0, latitudeDeg: 0 }, { longitudeDeg: -1, latitudeDeg: 0 });
    expect(middleBearingDeg(path)).toBeCloseTo(270, 9);
  });
  it('gives the smaller turn with its sign', () => {
    expect(turnDeg(350, 10)).toBeCloseTo(20, 9);
    expect(turnDeg(10, 350)).toBeCloseTo(-20, 9);
  });
});

describe('completeLine', () => {
  const structure = (name: string, longitudeDeg: number, kind: 'dead-end' | 'suspension') => ({
    row: 1,
    name,
    kind,
    position: { longitudeDeg, latitudeDeg: 0 },
    structureHeightM: 20,
    groundElevationM: 0,
  });
  const line: LineDraft = {
    row: 1,
    name: 'Cape',
    voltageV: null,
    isAssumed: false,
    structures: [structure('1', 0, 'dead-end'), structure('2', 0.002, 'suspension'), structure('3', 0.005, 'dead-end')],
    sections: [
      {
        structureIndexes: [0, 1, 2],
        wires: [{ row: 2, name: 'A', kind: 'phase', conductorTypeId: 'drake', ...drake }],
      },
    ],
  };

  it('chains the spans and names the section by its dead-ends', () => {
    const issues = createIssueList();
    const completed = completeLine(line, issues);
    const [section] = completed.sections;
    expect(section?.name).toBe('1–3');
    expect(section?.spans.map(({ orderIndex }) => orderIndex)).toEqual([0, 1]);
    expect(section?.spans[0]?.toStructureId).toBe(section?.spans[1]?.fromStructureId);
    // 0.001 degree along the equator is 111.3195 m on WGS84 (equatorial radius 6 378 137 m).
    expect(section?.spans[0]?.spanLengthM).toBeCloseTo(222.639, 2);
    expect(section?.sectionLengthM).toBeCloseTo(556.597, 2);
    expect(section?.spans[0]?.bearingDeg).toBeCloseTo(90, 6);
    expect(issues.notices).toEqual([]);
  });
});
