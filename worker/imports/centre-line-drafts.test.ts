import { describe, expect, it } from 'vitest';
import { importOptionsSchema } from '#shared/contract/imports.ts';
import { checkFile } from './check-file.ts';
import { createConductorLookup } from './conductor-lookup.ts';
import { dividePath, geodesicPath } from './geodesic-path.ts';
import { createIssueList } from './issue-list.ts';

const conductors = createConductorLookup([
  { id: 'drake', name: 'Drake', standard: 'NBR', massKgPerM: 1.6283, ratedStrengthN: 140_000 },
]);
const voltageClass = {
  upToVoltageV: 220_000,
  conductorName: 'Drake',
  phaseWireCount: 3,
  tensionRatedRatio: 0.2,
  structureHeightM: 24,
};

function check(content: string, more: { assumptions?: object | null; format?: 'csv' | 'geojson' } = {}) {
  const issues = createIssueList();
  const assumptions =
    more.assumptions === null ? {} : { assumptions: { voltageClasses: [voltageClass], ...more.assumptions } };
  const options = importOptionsSchema.parse({ kind: 'centre-line', format: more.format ?? 'geojson', ...assumptions });
  return { ...checkFile(new TextEncoder().encode(content), { options, conductors, issues }), issues };
}

type Pair = readonly [number, number];
const lineFeature = (parts: readonly (readonly Pair[])[], properties: object = {}) => ({
  type: 'Feature',
  properties: { line_name: 'Cape', voltage_kv: 110, ...properties },
  geometry: { type: 'MultiLineString', coordinates: parts },
});
const collection = (...features: readonly object[]) => JSON.stringify({ type: 'FeatureCollection', features });
/** Places on a plane near the equator of the tests: metres east and north of a point. */
const at = (eastM: number, northM: number): Pair => [-21 + eastM / 87_220, -38.5 + northM / 111_000];

describe('dividing a centre line', () => {
  it('makes equal spans near the typical length, dead-ends at the ends, and marks all of it assumed', () => {
    const { lines, issues } = check(collection(lineFeature([[at(0, 0), at(3500, 0)]])));
    expect(issues.errors).toEqual([]);
    const [line] = lines;
    expect(line).toMatchObject({ isAssumed: true, voltageV: 110_000 });
    expect(line?.structures).toHaveLength(11);
    expect(line?.structures.map(({ kind }) => kind)).toEqual([
      'dead-end',
      ...Array.from({ length: 9 }, () => 'suspension'),
      'dead-end',
    ]);
    expect(line?.sections).toHaveLength(1);
    expect(line?.sections[0]?.wires.map(({ name, tensionN }) => [name, tensionN])).toEqual([
      ['A', 28_000],
      ['B', 28_000],
      ['C', 28_000],
    ]);
    const lengthsM =
      line?.structures
        .slice(1)
        .map(({ position }, index) => geodesicPath(line.structures[index]?.position ?? position, position).lengthM) ??
      [];
    expect(Math.max(...lengthsM) - Math.min(...lengthsM)).toBeLessThan(1e-6);
  });

  it.each([
    ['a sharp turn becomes a dead-end', 400, 2],
    ['a slight turn stays a suspension structure', 100, 1],
  ])('%s', (_name, northM, sectionCount) => {
    const { lines } = check(collection(lineFeature([[at(0, 0), at(1000, 0), at(2000, northM)]])));
    expect(lines[0]?.sections).toHaveLength(sectionCount);
    expect(lines[0]?.structures).toHaveLength(7);
  });

  it('divides along the geodesic', () => {
    const [middle] = dividePath({ longitudeDeg: 0, latitudeDeg: 60 }, { longitudeDeg: 90, latitudeDeg: 60 }, 2);
    // On a sphere the middle lies at atan(tan 60° / cos 45°) = 67.79°; the flattening moves it by less than 0.1°.
    expect(middle?.longitudeDeg).toBeCloseTo(45, 6);
    expect(middle?.latitudeDeg).toBeGreaterThan(67.69);
    expect(middle?.latitudeDeg).toBeLessThan(67.89);
  });
});

describe('joining parts', () => {
  it('joins parts whose ends coincide, drawn in any direction and order', () => {
    const parts = [
      [at(2000, 0), at(1000.5, 0)],
      [at(2000, 0), at(3000, 0)],
      [at(0, 0), at(1000, 0)],
    ];
    const { lines } = check(collection(lineFeature(parts)));
    expect(lines[0]?.sections).toHaveLength(1);
    expect(lines[0]?.structures).toHaveLength(10);
  });

  it('leaves parts apart that are further than a metre from each other', () => {
    const { lines } = check(
      collection(
        lineFeature([
          [at(0, 0), at(1000, 0)],
          [at(1010, 0), at(2000, 0)],
        ]),
      ),
    );
    expect(lines[0]?.sections).toHaveLength(2);
    expect(lines[0]?.structures).toHaveLength(8);
  });

  it('ends sections at a branch and shares its structure', () => {
    const parts = [
      [at(0, 0), at(1000, 0)],
      [at(1000, 0), at(2000, 0)],
      [at(1000, 0), at(1000, 1000)],
    ];
    const { lines } = check(collection(lineFeature(parts)));
    expect(lines[0]?.sections).toHaveLength(3);
    expect(lines[0]?.structures).toHaveLength(10);
  });

  it('leaves out stubs and names them, and runs on past them', () => {
    const parts = [
      [at(0, 0), at(1000, 0)],
      [at(1000, 0), at(2000, 0)],
      [at(1000, 0), at(1000, 12)],
    ];
    const { lines, issues, leftOutCount } = check(collection(lineFeature(parts)));
    expect(lines[0]?.sections).toHaveLength(1);
    expect(leftOutCount).toBe(1);
    expect(issues.notices[0]).toMatchObject({ row: 1, message: expect.stringContaining('12.0 m') });
  });

  it('takes features of one name and voltage as one line, and refuses one name with two voltages', () => {
    const [first, second] = [lineFeature([[at(0, 0), at(1000, 0)]]), lineFeature([[at(1000, 0), at(2000, 0)]])];
    expect(check(collection(first, second)).lines[0]?.sections).toHaveLength(1);
    const other = lineFeature([[at(1000, 0), at(2000, 0)]], { voltage_kv: 66 });
    expect(check(collection(first, other)).issues.errors[0]).toMatchObject({ row: 2, value: 'Cape' });
  });

  it('closes a ring without an end of no length', () => {
    const { lines } = check(collection(lineFeature([[at(0, 0), at(1000, 0), at(1000, 1000), at(0, 0)]])));
    const [line] = lines;
    expect(line?.sections.map(({ structureIndexes }) => structureIndexes[0])).not.toContain(undefined);
    expect(line?.sections).toHaveLength(3);
    expect(line?.structures).toHaveLength(3 + 3 + 2 + 2);
  });
});

describe('a bad centre line', () => {
  const good: readonly (readonly Pair[])[] = [[at(0, 0), at(1000, 0)]];
  it.each<[string, readonly object[], string, string]>([
    ['a negative voltage', [lineFeature(good, { voltage_kv: -110 })], 'voltage_kv', 'negative'],
    [
      'a voltage that no class covers',
      [lineFeature(good, { voltage_kv: 400 })],
      'assumptions.voltageClasses',
      '400 kV',
    ],
    ['no name', [lineFeature(good, { line_name: '' })], 'line_name', 'empty'],
    ['a part of one point', [lineFeature([[at(0, 0)]])], 'geometry part 1', 'two points'],
    ['crossed coordinates', [lineFeature([[[-38.5, 174], at(0, 0)]])], 'geometry part 1, point 1', 'crossed'],
    ['a polygon', [{ ...lineFeature(good), geometry: { type: 'Polygon', coordinates: [] } }], 'geometry', 'LineString'],
    ['no geometry', [{ ...lineFeature(good), geometry: null }], 'geometry', 'LineString'],
  ])('%s', (_name, features, ...[field, part]) => {
    const { issues } = check(collection(...features));
    expect(issues.errors).toMatchObject([{ row: 1, field, message: expect.stringContaining(part) }]);
  });

  it('without assumptions', () => {
    const { issues } = check(collection(lineFeature(good)), { assumptions: null });
    expect(issues.errors).toMatchObject([{ field: 'assumptions' }]);
  });

  it('with an unknown conductor in the assumptions', () => {
    const { issues } = check(collection(lineFeature(good)), {
      assumptions: { voltageClasses: [{ ...voltageClass, conductorName: 'Drak' }] },
    });
    expect(issues.errors).toMatchObject([
      { field: 'assumptions.voltageClasses[0].conductorName', message: expect.stringContaining('Drake') },
    ]);
  });

  it('leaves out features without a voltage with a notice', () => {
    const { issues, lines, leftOutCount } = check(
      collection(lineFeature(good, { voltage_kv: 0, line_name: 'Sea' }), lineFeature(good)),
    );
    expect(lines.map(({ name }) => name)).toEqual(['Cape']);
    expect(leftOutCount).toBe(1);
    expect(issues.notices).toMatchObject([{ row: 1, field: 'voltage_kv', message: expect.stringContaining('"Sea"') }]);
  });
});

describe('centre lines as a table', () => {
  const table = (wkt: string) => `line_name,voltage_kv,wkt\nCape,110,"${wkt}"\n`;
  it('reads LINESTRING and MULTILINESTRING', () => {
    const one = check(table('LINESTRING (-21 -38.5, -20.98 -38.5)'), { format: 'csv' });
    const two = check(table('MULTILINESTRING Z ((-21 -38.5 7, -20.99 -38.5 7),(-20.99 -38.5 7,-20.98 -38.5 7))'), {
      format: 'csv',
    });
    expect([...one.issues.errors, ...two.issues.errors]).toEqual([]);
    expect(one.lines[0]?.sections).toHaveLength(1);
    expect(two.lines[0]?.sections).toHaveLength(1);
  });

  it.each(['LINESTRING (-21 x, -20 -38)', 'POLYGON ((0 0, 1 1))', 'LINESTRING EMPTY', 'MULTILINESTRING ()'])(
    'refuses %s',
    (wkt) => {
      const { issues } = check(table(wkt), { format: 'csv' });
      expect(issues.errors.length).toBeGreaterThan(0);
      expect(issues.errors.every(({ row }) => row === 2)).toBe(true);
    },
  );
});
