import { drawLine } from './draw-line.ts';
import { drawZone } from './draw-zone.ts';
import { structureRecords, wireRecords, type RecordFields } from './line-records.ts';
import {
  branchCourse,
  sampleBranch,
  sampleLine,
  skuaIsland,
  ternIsland,
  type BranchPlan,
  type IslandPlan,
  type LinePlan,
} from './plan.ts';
import { coordinatesDeg } from './plane.ts';

const columns = [
  'record',
  'line_name',
  'voltage_kv',
  'name',
  'order',
  'longitude_deg',
  'latitude_deg',
  'structure_kind',
  'structure_height_m',
  'ground_elevation_m',
  'from_structure',
  'to_structure',
  'wire_kind',
  'conductor',
  'conductor_standard',
  'tension_n',
];

/** One feature a row, so that a change shows as one line. */
function collectionText(features: readonly object[]): string {
  const rows = features.map((feature) => JSON.stringify(feature)).join(',\n');
  return `{"type":"FeatureCollection","features":[\n${rows}\n]}\n`;
}

function seedOf(island: IslandPlan, line: LinePlan): number {
  return island.seed + island.lines.indexOf(line) * 101;
}

/** Lines of an island as surveyed GeoJSON. */
export function surveyedGeojson(island: IslandPlan): string {
  const features = island.lines.flatMap((line) => {
    const drawn = drawLine(line, seedOf(island, line));
    const structures = structureRecords(line, drawn, island.anchor).map(({ coordinates, fields }) => ({
      type: 'Feature',
      properties: { kind: 'structure', ...fields },
      geometry: { type: 'Point', coordinates },
    }));
    const wires = wireRecords(line, drawn).map((fields) => ({
      type: 'Feature',
      properties: { kind: 'wire', ...fields },
      geometry: null,
    }));
    return [...structures, ...wires];
  });
  return collectionText(features);
}

/** Lines of an island as a surveyed CSV table. */
export function surveyedCsv(island: IslandPlan): string {
  const cells = (fields: RecordFields) => columns.map((column) => fields[column] ?? '').join(',');
  const rows = island.lines.flatMap((line) => {
    const drawn = drawLine(line, seedOf(island, line));
    const structures = structureRecords(line, drawn, island.anchor).map(({ coordinates, fields }) =>
      cells({ record: 'structure', ...fields, longitude_deg: coordinates[0], latitude_deg: coordinates[1] }),
    );
    return [...structures, ...wireRecords(line, drawn).map((fields) => cells({ record: 'wire', ...fields }))];
  });
  return `${[columns.join(','), ...rows].join('\n')}\n`;
}

function terrainGeojson(island: IslandPlan): string {
  return collectionText(island.zones.map((zone, index) => drawZone(zone, island.seed + index, island.anchor)));
}

function branchParts({ parts }: BranchPlan): [number, number][][] {
  return parts.map((part) => part.map((place) => coordinatesDeg(place, ternIsland.anchor)));
}

function centreLineGeojson(branch: BranchPlan): string {
  const properties = { line_name: branch.name, voltage_kv: branch.voltageKV };
  const geometry = { type: 'MultiLineString', coordinates: branchParts(branch) };
  return collectionText([{ type: 'Feature', properties, geometry }]);
}

function centreLineCsv(branch: BranchPlan): string {
  const parts = branchParts(branch).map((part) => `(${part.map((pair) => pair.join(' ')).join(', ')})`);
  return `line_name,voltage_kv,wkt\n${branch.name},${branch.voltageKV},"MULTILINESTRING (${parts.join(', ')})"\n`;
}

/** Every file that is made from the plans, by its path in the project. */
export function islandFiles(): ReadonlyMap<string, string> {
  return new Map([
    ['seeds/data/tern/lines.geojson', surveyedGeojson(ternIsland)],
    ['seeds/data/tern/branch.geojson', centreLineGeojson(branchCourse)],
    ['seeds/data/tern/terrain.geojson', terrainGeojson(ternIsland)],
    ['seeds/data/skua/lines.csv', surveyedCsv(skuaIsland)],
    ['seeds/data/skua/terrain.geojson', terrainGeojson(skuaIsland)],
    ['public/samples/surveyed-lines.geojson', surveyedGeojson({ ...ternIsland, lines: [sampleLine] })],
    ['public/samples/centre-lines.csv', centreLineCsv(sampleBranch)],
  ]);
}
