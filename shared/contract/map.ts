import { z } from 'zod';
import { gradeSchema } from './grades.ts';
import { idSchema } from './paging.ts';
import { route } from './route.ts';

const positionSchema = z.array(z.number()).min(2).max(3);
export const lineStringSchema = z.object({ type: z.literal('LineString'), coordinates: z.array(positionSchema) });
export const pointSchema = z.object({ type: z.literal('Point'), coordinates: positionSchema });
export const multiPolygonSchema = z.object({
  type: z.literal('MultiPolygon'),
  coordinates: z.array(z.array(z.array(positionSchema).min(4))),
});

function collectionOf<G extends z.ZodType, P extends z.ZodType>(geometry: G, properties: P) {
  return z.object({
    type: z.literal('FeatureCollection'),
    features: z.array(z.object({ type: z.literal('Feature'), id: idSchema, geometry, properties })),
    isTruncated: z.boolean().describe('True when the box held more than is sent; zoom in'),
  });
}

const gradeState = {
  grade: gradeSchema.nullable().describe('Worst grade of its span wires; null when not assessed'),
  isStale: z.boolean().describe('True when an input changed since the last assessment'),
  isAssumed: z.boolean().describe('True when spans, wires or tensions were assumed at import'),
};

export const mapSectionsSchema = collectionOf(
  lineStringSchema,
  z.object({ ...gradeState, name: z.string(), lineId: idSchema, lineName: z.string(), spanCount: z.number().int() }),
);
export const mapSpansSchema = collectionOf(
  lineStringSchema,
  z.object({
    ...gradeState,
    label: z.string().describe('Structure names at both ends, e.g. 14–15'),
    sectionId: idSchema,
    lineName: z.string(),
    spanLengthM: z.number(),
    dampers: z
      .array(z.object({ side: z.enum(['from', 'to']), isAsBuilt: z.boolean() }))
      .describe('Ticks to draw at the side of the span where they sit'),
  }),
);
export const mapStructuresSchema = collectionOf(
  pointSchema,
  z.object({ name: z.string(), kind: z.enum(['dead-end', 'suspension']), lineId: idSchema, isAssumed: z.boolean() }),
);
export const mapTerrainSchema = collectionOf(
  multiPolygonSchema,
  z.object({ name: z.string(), roughnessM: z.number() }),
);
export const mapExtentSchema = z.object({
  extentDeg: z
    .array(z.number())
    .length(4)
    .nullable()
    .describe('[west, south, east, north] of all lines; null when none'),
});

const boxQuery = z.object({
  bboxDeg: z
    .string()
    .transform((text) => text.split(',').map(Number))
    .pipe(z.array(z.number().min(-360).max(360)).length(4))
    .optional()
    .describe('west,south,east,north'),
});
const mapAccess = ['engineer', 'crew', 'manager', 'safety-officer', 'admin'] as const;
const mapRoute = <S extends z.ZodType>(path: string, summary: string, response: S) =>
  route({
    method: 'get',
    path,
    summary,
    access: mapAccess,
    query: boxQuery,
    response,
    status: 200,
    problems: ['invalid-input', 'not-signed-in', 'not-allowed'],
  });

export const mapRoutes = {
  getMapExtent: mapRoute('/map/extent', 'Box that holds all lines', mapExtentSchema),
  getMapSections: mapRoute('/map/sections', 'Sections by grade, simplified for drawing', mapSectionsSchema),
  getMapSpans: mapRoute('/map/spans', 'Spans by grade in a box (near zoom)', mapSpansSchema),
  getMapStructures: mapRoute('/map/structures', 'Structures in a box (near zoom)', mapStructuresSchema),
  getMapTerrain: mapRoute('/map/terrain', 'Terrain zones', mapTerrainSchema),
};
