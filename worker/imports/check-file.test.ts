import { describe, expect, it } from 'vitest';
import { importOptionsSchema } from '#shared/contract/imports.ts';
import { checkFile } from './check-file.ts';
import { createConductorLookup } from './conductor-lookup.ts';
import { createIssueList } from './issue-list.ts';
import { importLimitBytes } from './read-text.ts';

const conductors = createConductorLookup([
  { id: 'drake', name: 'Drake', standard: 'NBR', massKgPerM: 1.6283, ratedStrengthN: 140_000 },
  { id: 'hawk-1', name: 'Hawk', standard: 'NBR', massKgPerM: 0.975, ratedStrengthN: 86_000 },
  { id: 'hawk-2', name: 'Hawk', standard: 'BS', massKgPerM: 0.975, ratedStrengthN: 86_000 },
]);

function check(
  content: string | Uint8Array,
  options: { kind?: 'surveyed' | 'centre-line'; format: 'csv' | 'geojson' },
) {
  const issues = createIssueList();
  const bytes = typeof content === 'string' ? new TextEncoder().encode(content) : content;
  const parsed = importOptionsSchema.parse({ kind: 'surveyed', ...options });
  const checked = checkFile(bytes, { options: parsed, conductors, issues });
  return { ...checked, issues };
}

const header =
  'record,line_name,voltage_kv,name,order,longitude_deg,latitude_deg,structure_kind,structure_height_m,from_structure,to_structure,wire_kind,conductor,conductor_standard,tension_n';
const structures = [
  'structure,Cape,110,1,1,-21.000,-38.500,dead-end,18,,,,,,',
  'structure,Cape,110,2,2,-20.996,-38.500,suspension,20,,,,,,',
  'structure,Cape,110,3,3,-20.992,-38.501,dead-end,18,,,,,,',
];
const wire = 'wire,Cape,,A,,,,,,1,3,phase,Drake,,28000';
const table = (...rows: readonly string[]) => [header, ...rows].join('\n');
const replaced = (row: number, from: string, to: string) =>
  table(...structures.map((text, index) => (index === row ? text.replace(from, to) : text)), wire);

/** The only error of a file, so that a case cannot pass by an error it did not mean. */
function onlyError(content: string | Uint8Array, format: 'csv' | 'geojson' = 'csv') {
  const { errors } = check(content, { format }).issues;
  expect(errors.map(({ message }) => message)).toHaveLength(1);
  return errors[0];
}

describe('a good surveyed table', () => {
  it('becomes a line with sections, structures in order and wires', () => {
    const { lines, issues } = check(table(structures[2] ?? '', structures[0] ?? '', structures[1] ?? '', wire), {
      format: 'csv',
    });
    expect(issues.errors).toEqual([]);
    expect(lines).toHaveLength(1);
    expect(lines[0]).toMatchObject({ name: 'Cape', voltageV: 110_000, isAssumed: false });
    expect(lines[0]?.structures.map(({ name }) => name)).toEqual(['1', '2', '3']);
    expect(lines[0]?.sections).toMatchObject([
      {
        structureIndexes: [0, 1, 2],
        wires: [{ name: 'A', kind: 'phase', conductorTypeId: 'drake', tensionN: 28_000 }],
      },
    ]);
  });

  it('reads semicolons, a byte order mark and quoted names', () => {
    const content = `\uFEFF${table(...structures, wire)
      .replaceAll(',', ';')
      .replaceAll('Cape', '"Cape; ""North"""')}`;
    const { lines, issues } = check(content, { format: 'csv' });
    expect(issues.errors).toEqual([]);
    expect(lines[0]?.name).toBe('Cape; "North"');
  });

  it('strings a wire that passes a dead-end in both sections', () => {
    const { lines } = check(replaced(1, 'suspension', 'dead-end'), { format: 'csv' });
    expect(lines[0]?.sections.map(({ wires }) => wires.length)).toEqual([1, 1]);
  });

  it('names a section without a wire in a notice', () => {
    const { issues } = check(table(...structures), { format: 'csv' });
    expect(issues.errors).toEqual([]);
    expect(issues.notices[0]?.message).toContain('No wire');
  });
});

describe('a bad surveyed table names row, field and what is allowed', () => {
  const cases: readonly [string, string, { row: number; field: string; part: string }][] = [
    ['a negative height', replaced(1, ',20,', ',-20,'), { row: 3, field: 'structure_height_m', part: 'at least 2' }],
    ['an absurd height', replaced(1, ',20,', ',2000,'), { row: 3, field: 'structure_height_m', part: '2 to 400 m' }],
    ['NaN', replaced(1, ',20,', ',NaN,'), { row: 3, field: 'structure_height_m', part: 'finite number' }],
    ['Infinity', replaced(1, ',20,', ',Infinity,'), { row: 3, field: 'structure_height_m', part: 'finite number' }],
    [
      'an overflowing number',
      replaced(1, ',20,', ',1e999,'),
      { row: 3, field: 'structure_height_m', part: 'finite number' },
    ],
    ['a missing height', replaced(1, ',20,', ',,'), { row: 3, field: 'structure_height_m', part: 'is required' }],
    ['a negative voltage', replaced(1, ',110,', ',-110,'), { row: 3, field: 'voltage_kv', part: 'negative' }],
    ['two voltages', replaced(1, ',110,', ',220,'), { row: 3, field: 'voltage_kv', part: 'one voltage' }],
    [
      'an unknown structure kind',
      replaced(1, 'suspension', 'tangent'),
      { row: 3, field: 'structure_kind', part: 'dead-end, suspension' },
    ],
    ['a twin name', replaced(1, ',2,2,', ',1,2,'), { row: 3, field: 'name', part: 'in row 2' }],
    ['a twin order', replaced(1, ',2,2,', ',2,1,'), { row: 3, field: 'order', part: 'in row 2' }],
    [
      'crossed coordinates',
      replaced(1, '-20.996,-38.500', '-38.5,-120.996'),
      { row: 3, field: 'longitude_deg, latitude_deg', part: 'crossed' },
    ],
    [
      'coordinates off the earth',
      replaced(1, '-20.996,-38.500', '-2099,-385'),
      { row: 3, field: 'longitude_deg, latitude_deg', part: 'not on earth' },
    ],
    [
      'a short span',
      replaced(1, '-20.996,-38.500', '-20.99999,-38.5'),
      { row: 3, field: 'geometry', part: '5 to 5000 m' },
    ],
    [
      'a long last span',
      replaced(2, '-20.992,-38.501', '-20.9,-38.501'),
      { row: 4, field: 'geometry', part: '5 to 5000 m' },
    ],
    [
      'an open end',
      replaced(2, 'dead-end', 'suspension'),
      { row: 4, field: 'structure_kind', part: 'must be a dead-end' },
    ],
    [
      'a tension above strength',
      table(...structures, wire.replace('28000', '141000')),
      { row: 5, field: 'tension_n', part: 'below 140000 N' },
    ],
    [
      'a negative tension',
      table(...structures, wire.replace('28000', '-28000')),
      { row: 5, field: 'tension_n', part: 'at least 100' },
    ],
    [
      'an unknown conductor',
      table(...structures, wire.replace('Drake', 'Darke')),
      { row: 5, field: 'conductor', part: 'Near names: Drake' },
    ],
    [
      'a conductor of two standards',
      table(...structures, wire.replace('Drake', 'Hawk')),
      { row: 5, field: 'conductor', part: '"NBR", "BS"' },
    ],
    [
      'a wire at no dead-end',
      table(...structures, wire.replace(',1,3,', ',1,2,')),
      { row: 5, field: 'to_structure', part: 'dead-ends' },
    ],
    [
      'a wire to nowhere',
      table(...structures, wire.replace(',1,3,', ',1,9,')),
      { row: 5, field: 'to_structure', part: 'no structure "9"' },
    ],
    [
      'a wire of no length',
      table(...structures, wire.replace(',1,3,', ',1,1,')),
      { row: 5, field: 'to_structure', part: 'another structure' },
    ],
    ['twin wires', table(...structures, wire, wire), { row: 6, field: 'name', part: 'in row 5' }],
    [
      'a wire of no line',
      table(...structures, wire, wire.replace('Cape', 'Bay')),
      { row: 6, field: 'line_name', part: 'no structures' },
    ],
    [
      'tables out of order',
      table(...structures.slice(0, 2), wire, structures[2] ?? ''),
      { row: 4, field: 'record', part: 'out of order' },
    ],
    [
      'an unknown record',
      table(...structures, wire, 'tower,Cape,,,,,,,,,,,,,'),
      { row: 6, field: 'record', part: 'structure, wire' },
    ],
    [
      'a missing column',
      table(...structures, wire).replace('tension_n', 'tension'),
      { row: 1, field: 'tension_n', part: 'is missing' },
    ],
    ['a control character', replaced(1, ',2,2,', ',2\u0000,2,'), { row: 3, field: 'name', part: 'control characters' }],
  ];
  it.each(cases)('%s', (_name, content, { row, field, part }) => {
    expect(onlyError(content)).toMatchObject({ row, field, message: expect.stringContaining(part) });
  });

  it('a row with a cell too few', () => {
    expect(onlyError(table(...structures, 'wire,Cape'))).toMatchObject({
      row: 5,
      message: expect.stringContaining('2 cells'),
    });
  });

  it('an unclosed quote', () => {
    expect(onlyError(table(...structures, '"wire'))).toMatchObject({ field: 'file' });
  });

  it('reports every bad row, not only the first', () => {
    const { issues } = check(table(...structures.map((row) => row.replace(/,(18|20),/, ',-1,'))), { format: 'csv' });
    expect(issues.errors.map(({ row }) => row)).toEqual([2, 3, 4]);
  });
});

describe('a file that cannot be read', () => {
  it('names the text line that is not UTF-8', () => {
    const bytes = new TextEncoder().encode(table(...structures, wire));
    bytes[bytes.indexOf(0x0a, bytes.indexOf(0x0a) + 1) + 12] = 0xe9;
    expect(onlyError(bytes)).toMatchObject({ row: 3, field: 'file', message: expect.stringContaining('UTF-8') });
  });

  it('refuses one above the limit before reading it', () => {
    expect(onlyError(new Uint8Array(importLimitBytes + 1))).toMatchObject({
      field: 'file',
      message: expect.stringContaining('40 MB'),
    });
  });

  it('refuses an empty one', () => {
    expect(onlyError(' \n')).toMatchObject({ message: expect.stringContaining('empty') });
  });

  it('refuses one without lines', () => {
    expect(onlyError(header)).toMatchObject({ message: expect.stringContaining('no line') });
  });
});

const feature = (properties: object, coordinates?: readonly number[]) => ({
  type: 'Feature',
  properties,
  geometry: coordinates === undefined ? null : { type: 'Point', coordinates },
});
const structureFeature = (name: string, order: number, longitudeDeg: number) =>
  feature({ kind: 'structure', line_name: 'Cape', name, order, structure_kind: 'dead-end', structure_height_m: 18 }, [
    longitudeDeg,
    -38.5,
  ]);
const wireFeature = feature({
  kind: 'wire',
  line_name: 'Cape',
  name: 'A',
  from_structure: 1,
  to_structure: '2',
  wire_kind: 'phase',
  conductor: 'drake',
  tension_n: 28000,
});
const geojson = (...features: readonly object[]) => JSON.stringify({ type: 'FeatureCollection', features });

describe('surveyed GeoJSON', () => {
  it('is read in any order of features', () => {
    const { lines, issues } = check(
      geojson(wireFeature, structureFeature('1', 1, -21), structureFeature('2', 2, -20.996)),
      { format: 'geojson' },
    );
    expect(issues.errors).toEqual([]);
    expect(lines[0]?.sections[0]?.wires[0]?.conductorTypeId).toBe('drake');
  });

  const good = geojson(structureFeature('1', 1, -21), structureFeature('2', 2, -20.996), wireFeature);
  it.each([
    ['NaN', good.replace(':28000', ':NaN'), 'tension_n', 'NaN is not a number'],
    ['minus Infinity', good.replace(':28000', ':-Infinity'), 'tension_n', '-Infinity is not a number'],
    ['text in place of JSON', 'line_name,voltage', 'file', 'not JSON'],
    ['a single feature', JSON.stringify(wireFeature), 'type', 'FeatureCollection'],
    [
      'another coordinate system',
      good.replace('{', '{"crs":{"type":"name","properties":{"name":"urn:ogc:def:crs:EPSG::2193"}},'),
      'crs',
      'WGS84',
    ],
    ['a structure without a point', good.replace('"Point"', '"LineString"'), 'geometry', 'needs a Point'],
    ['a thing that is no feature', good.replace('[{', '[7,{'), 'type', 'GeoJSON Feature'],
  ])('refuses %s', (_name, content, ...[field, part]) => {
    expect(onlyError(content, 'geojson')).toMatchObject({ field, message: expect.stringContaining(part) });
  });

  it('does not take the word NaN inside a name for a number', () => {
    const { issues } = check(good.replaceAll('Cape', 'NaN Infinity'), { format: 'geojson' });
    expect(issues.errors).toEqual([]);
  });
});
