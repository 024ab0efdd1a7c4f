import { z } from 'zod';
import { gradeSchema } from './grades.ts';
import { idSchema, instantSchema, versionNumberSchema } from './paging.ts';
import { placementSchema } from './placements.ts';
import { tensionNSchema } from './quantity.ts';
import { route } from './route.ts';

export const sectionStructureSchema = z.object({
  id: idSchema,
  name: z.string(),
  kind: z.enum(['dead-end', 'suspension']),
  positionDeg: z.array(z.number()).length(2),
  groundElevationM: z.number(),
  structureHeightM: z.number(),
  chainageM: z.number().describe('Distance along the section from its first structure'),
  isAssumed: z.boolean(),
});
export const sectionSpanSchema = z.object({
  id: idSchema,
  label: z.string(),
  fromStructureId: idSchema,
  toStructureId: idSchema,
  orderIndex: z.number().int(),
  spanLengthM: z.number(),
  bearingDeg: z.number(),
  roughnessM: z.number(),
  turbulenceIntensityRatio: z.number(),
  terrainZoneName: z
    .string()
    .nullable()
    .describe('Null: no zone drawn here, the default roughness of the utility holds'),
  isAssumed: z.boolean(),
});
export const wireSchema = z.object({
  id: idSchema,
  name: z.string(),
  kind: z.enum(['phase', 'earth']),
  conductorTypeId: idSchema,
  conductorName: z.string(),
  conductorDiameterM: z.number(),
  conductorMassKgPerM: z.number(),
  ratedStrengthN: z.number(),
  tensionN: z.number(),
  isAssumed: z.boolean(),
  versionNumber: versionNumberSchema,
});
export type Wire = z.infer<typeof wireSchema>;
export const spanWireSchema = z.object({
  id: idSchema,
  spanId: idSchema,
  wireId: idSchema,
  grade: gradeSchema.nullable(),
  isStale: z.boolean(),
  staleReason: z.string().nullable(),
  findingId: idSchema.nullable().describe('Its newest finding'),
  utilisationRatio: z.number().nullable(),
});
export const sectionSchema = z.object({
  id: idSchema,
  name: z.string(),
  lineId: idSchema,
  lineName: z.string(),
  rulingSpanM: z.number(),
  lengthM: z.number(),
  grade: gradeSchema.nullable(),
  isStale: z.boolean(),
  isAssumed: z.boolean(),
  assessedAt: instantSchema.nullable(),
  structures: z.array(sectionStructureSchema),
  spans: z.array(sectionSpanSchema),
  wires: z.array(wireSchema),
  spanWires: z.array(spanWireSchema),
  placements: z.array(placementSchema).describe('Standing and ended placements, newest first'),
});
export type Section = z.infer<typeof sectionSchema>;

export const wirePatchSchema = z.strictObject({
  tensionN: tensionNSchema.optional(),
  conductorTypeId: idSchema.optional(),
});

export const sectionRoutes = {
  getSection: route({
    method: 'get',
    path: '/sections/:sectionId',
    summary: 'A section: structures, spans, wires, dampers and grades',
    access: ['engineer', 'crew', 'manager', 'safety-officer', 'admin'],
    params: z.object({ sectionId: idSchema }),
    response: sectionSchema,
    status: 200,
    problems: ['not-signed-in', 'not-allowed', 'not-found'],
  }),
  editWire: route({
    method: 'patch',
    path: '/wires/:wireId',
    summary: 'Change conductor type or tension of a wire; its findings turn stale',
    access: ['engineer'],
    params: z.object({ wireId: idSchema }),
    body: wirePatchSchema,
    response: wireSchema,
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
