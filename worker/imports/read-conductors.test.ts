import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { createIssueList } from './issue-list.ts';
import { readConductors } from './read-conductors.ts';

const table = readFileSync(new URL('../../seeds/data/conductors.csv', import.meta.url), 'utf8');
const titles = new Map([['NBR7270', 'ABNT NBR 7270']]);

function read(content: string) {
  const issues = createIssueList();
  return { records: readConductors(content, titles, issues), issues };
}

describe('the conductor table of the seeds', () => {
  const { records, issues } = read(table);
  const named = (name: string, standard: string) =>
    records.find((one) => one.name === name && one.standard === standard);

  it('is read without an error, each name and standard once', () => {
    expect(issues.errors).toEqual([]);
    expect(records).toHaveLength(268);
    expect(new Set(records.map(({ name, standard }) => `${name}|${standard}`)).size).toBe(268);
  });

  it('is turned into SI units and keeps the text as published', () => {
    expect(named('Drake', 'ABNT NBR 7270')).toMatchObject({
      kind: 'ACSR',
      massKgPerM: 1.6265,
      ratedStrengthN: 139_700,
      aluminiumLayerCount: 2,
      outerStrandModulusPa: 69e9,
      source: expect.stringContaining('ABNT NBR 7270'),
      asPublished: expect.objectContaining({ diameter_mm: '28.11', rated_tensile_strength_kN: '139.7' }),
    });
    expect(named('Drake', 'ABNT NBR 7270')?.diameterM).toBeCloseTo(0.02811, 12);
    expect(named('Drake', 'ABNT NBR 7270')?.outerStrandDiameterM).toBeCloseTo(0.00444, 12);
  });

  it('gives 26/7 of 4.44 and 3.45 mm a stiffness near that of 795 kcmil 26/7, 44.06 to 1604 N·m²', () => {
    // Strands rounded to 0.01 mm: up to 0.15 % each, to the fourth power.
    const drake = named('Drake', 'ABNT NBR 7270');
    expect((drake?.bendingStiffnessMinNm2 ?? 0) / 44.06).toBeCloseTo(1, 2);
    expect((drake?.bendingStiffnessMaxNm2 ?? 0) / 1603.75).toBeCloseTo(1, 2);
  });

  it('takes steel wires as steel, and OPGW as not known', () => {
    expect(named('SC/GZ 7/3.25', 'AS 1222.1')).toMatchObject({
      kind: 'STEEL',
      aluminiumLayerCount: 0,
      outerStrandModulusPa: 200e9,
    });
    expect(named('SC/GZ 7/3.25', 'AS 1222.1')?.bendingStiffnessMinNm2).toBeCloseTo(
      (7 * 200e9 * Math.PI * 0.00325 ** 4) / 64,
      9,
    );
    expect(
      records.filter(({ kind }) => kind === 'OPGW').map(({ bendingStiffnessMinNm2 }) => bendingStiffnessMinNm2),
    ).toEqual([null, null, null]);
  });

  it('never gives a wire that slips more stiffness than one that does not', () => {
    const known = records.filter(({ bendingStiffnessMaxNm2 }) => bendingStiffnessMaxNm2 !== null);
    expect(known.length).toBeGreaterThan(200);
    expect(known.filter((one) => (one.bendingStiffnessMaxNm2 ?? 0) < (one.bendingStiffnessMinNm2 ?? 0))).toEqual([]);
  });
});

describe('a bad conductor row', () => {
  const [header = '', first = ''] = table.split('\n');
  it.each([
    ['a negative mass', first.replace('2.1342', '-2.1342'), 'mass_kg_per_m', 'positive'],
    ['an unknown type', first.replace('ACSR', 'WOOD'), 'type', 'one of'],
    ['half a strand', first.replace(',45,', ',45.5,'), 'aluminium_strands', 'whole number'],
  ])('%s is named', (_name, row, ...[field, part]) => {
    const { records, issues } = read(`${header}\n${row}\n`);
    expect(records).toEqual([]);
    expect(issues.errors).toMatchObject([{ row: 2, field, message: expect.stringContaining(part) }]);
  });
});
