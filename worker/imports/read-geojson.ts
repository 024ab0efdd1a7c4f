import { z } from 'zod';
import type { IssueList } from './issue-list.ts';
import { findWrongNumber } from './find-wrong-number.ts';
import type { RawRow } from './raw-row.ts';

const collectionSchema = z.object({
  type: z.literal('FeatureCollection'),
  features: z.array(z.unknown()),
  crs: z.unknown().optional(),
});
const featureSchema = z.object({
  type: z.literal('Feature'),
  properties: z.record(z.string(), z.unknown()).nullish(),
  geometry: z.object({ type: z.string(), coordinates: z.unknown() }).nullish(),
});
const namedSystem = z.object({ properties: z.object({ name: z.string() }) });
const longitudeLatitude = /(CRS84|EPSG:+4326|EPSG::4326)$/i;

function parseJson(text: string, issues: IssueList): unknown {
  try {
    return JSON.parse(text);
  } catch (error) {
    const wrong = findWrongNumber(text);
    if (wrong === null) {
      const detail = error instanceof Error ? error.message : 'unknown reason';
      issues.addError({ row: null, field: 'file', message: `The file is not JSON: ${detail}` });
    } else {
      issues.addError({
        row: null,
        field: wrong.field ?? 'file',
        value: wrong.token,
        message: `Text line ${wrong.textRow}: ${wrong.token} is not a number that JSON allows; give a finite number or null.`,
      });
    }
    return undefined;
  }
}

/** Features of a GeoJSON FeatureCollection as raw rows, or null when the file is not one. */
export function readGeojson(text: string, issues: IssueList): RawRow[] | null {
  const json = parseJson(text, issues);
  if (json === undefined) return null;
  const collection = collectionSchema.safeParse(json);
  if (!collection.success) {
    issues.addError({
      row: null,
      field: 'type',
      message: 'The file must be a GeoJSON FeatureCollection with "features".',
    });
    return null;
  }
  const system = namedSystem.safeParse(collection.data.crs);
  if (system.success && !longitudeLatitude.test(system.data.properties.name)) {
    issues.addError({
      row: null,
      field: 'crs',
      value: system.data.properties.name,
      message: 'Coordinates must be longitude and latitude, WGS84 (EPSG:4326); export the layer in that system.',
    });
    return null;
  }
  return collection.data.features.flatMap((item, index) => {
    const row = index + 1;
    const feature = featureSchema.safeParse(item);
    if (feature.success) {
      return [{ row, values: feature.data.properties ?? {}, geometry: feature.data.geometry ?? null }];
    }
    issues.addError({ row, field: 'type', message: 'Must be a GeoJSON Feature with "properties" and "geometry".' });
    return [];
  });
}
