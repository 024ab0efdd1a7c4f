import { z } from 'zod';
import { damperModelSchema } from './dampers.ts';
import { multiPolygonSchema } from './map.ts';
import { idSchema, pageOf, pageQuery, versionNumberSchema } from './paging.ts';
import { roughnessMSchema } from './quantity.ts';
import { route } from './route.ts';

export const conductorTypeSchema = z.object({
  id: idSchema,
  name: z.string(),
  standard: z.string(),
  kind: z.string(),
  diameterM: z.number(),
  massKgPerM: z.number(),
  ratedStrengthN: z.number(),
  aluminiumLayerCount: z.number().int(),
  outerStrandDiameterM: z.number().nullable(),
  outerStrandModulusPa: z.number(),
  bendingStiffnessMinNm2: z.number().nullable(),
  bendingStiffnessMaxNm2: z.number().nullable(),
  modulusPa: z.number().nullable(),
  thermalExpansionPerK: z.number().nullable(),
  isAssessable: z.boolean().describe('False when the source gives too little (no strand diameter)'),
  source: z.string(),
  standing: z.string(),
});
export type ConductorType = z.infer<typeof conductorTypeSchema>;

export const damperTypeSchema = z.object({
  id: idSchema,
  name: z.string(),
  massKg: z.number(),
  model: damperModelSchema,
  source: z.string(),
  standing: z.string(),
  costAmount: z.number().nullable().describe('Cost fitted, in the currency of the utility'),
  versionNumber: versionNumberSchema,
});
export type DamperType = z.infer<typeof damperTypeSchema>;

export const climateSectorSchema = z.strictObject({
  directionRad: z
    .number()
    .min(0)
    .max(2 * Math.PI)
    .describe('Direction the wind comes from, clockwise from north'),
  shareRatio: z.number().min(0).max(1),
  weibullScaleMPerS: z.number().positive().max(40),
  weibullShapeNumber: z.number().min(0.5).max(10),
});
export const climateSchema = z.object({
  id: idSchema,
  name: z.string(),
  sectors: z.array(climateSectorSchema),
  icingHoursPerYearCount: z.number().nullable(),
  source: z.string(),
  versionNumber: versionNumberSchema,
});
export type Climate = z.infer<typeof climateSchema>;

export const terrainZoneSchema = z.object({
  id: idSchema,
  name: z.string(),
  roughnessM: z.number(),
  geometry: multiPolygonSchema,
  versionNumber: versionNumberSchema,
});
export const terrainZonePatchSchema = z.strictObject({
  name: z.string().trim().min(1).max(80).optional(),
  roughnessM: roughnessMSchema.optional(),
});

const readers = ['engineer', 'crew', 'manager', 'safety-officer', 'admin'] as const;
const listOf = <P extends `/${string}`, S extends z.ZodType>(path: P, summary: string, item: S) =>
  route({
    method: 'get',
    path,
    summary,
    access: readers,
    query: z.object({ ...pageQuery, search: z.string().max(100).optional() }),
    response: pageOf(item),
    status: 200,
    problems: ['invalid-input', 'not-signed-in', 'not-allowed'],
  });

export const catalogueRoutes = {
  listConductorTypes: listOf('/catalogue/conductors', 'Conductor types with their sources', conductorTypeSchema),
  listDamperTypes: listOf('/catalogue/damper-types', 'Damper types', damperTypeSchema),
  listClimates: listOf('/catalogue/climates', 'Wind climates', climateSchema),
  listTerrainZones: listOf('/catalogue/terrain-zones', 'Terrain zones', terrainZoneSchema),
  editTerrainZone: route({
    method: 'patch',
    path: '/catalogue/terrain-zones/:terrainZoneId',
    summary: 'Edit a terrain zone; findings that depend on it turn stale',
    access: ['engineer'],
    params: z.object({ terrainZoneId: idSchema }),
    body: terrainZonePatchSchema,
    response: terrainZoneSchema,
    status: 200,
    problems: [
      'invalid-input',
      'not-signed-in',
      'not-allowed',
      'not-found',
      'stale-version',
      'version-required',
      'csrf-refused',
    ],
    needsVersion: true,
  }),
};
