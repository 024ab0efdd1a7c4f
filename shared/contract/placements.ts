import { z } from 'zod';
import { gradeSchema } from './grades.ts';
import { idSchema, instantSchema, pageOf, pageQuery, versionNumberSchema } from './paging.ts';
import { damperDistanceMSchema } from './quantity.ts';
import { route } from './route.ts';

export const sides = ['from', 'to'] as const;
export const sideSchema = z
  .enum(sides)
  .describe('End of the span where the damper sits: its first or second structure');
export type Side = z.infer<typeof sideSchema>;

export const placementSchema = z.object({
  id: idSchema,
  spanWireId: idSchema,
  spanId: idSchema,
  wireId: idSchema,
  side: sideSchema,
  damperTypeId: idSchema,
  damperTypeName: z.string(),
  distanceM: z.number(),
  plannedDistanceM: z.number().nullable().describe('Distance of the planned placement this one realises'),
  state: z.enum(['planned', 'as-built']),
  startedAt: instantSchema.describe('When it was planned or fitted'),
  endedAt: instantSchema.nullable().describe('When it was replaced or removed; null while it stands'),
  loggedByName: z.string().nullable(),
  photoFileId: idSchema.nullable(),
  note: z.string(),
  versionNumber: versionNumberSchema,
});
export type Placement = z.infer<typeof placementSchema>;

const placementInput = {
  spanWireId: idSchema,
  side: sideSchema,
  damperTypeId: idSchema,
  distanceM: damperDistanceMSchema,
  note: z.string().max(1000).default(''),
};
export const plannedPlacementInputSchema = z.strictObject({ id: idSchema.optional(), ...placementInput });

/** A fitted damper as the crew logs it; `id` is made by the client, so that sending twice changes nothing. */
export const fieldLogInputSchema = z.strictObject({
  id: idSchema.describe('Made by the client'),
  ...placementInput,
  fittedAt: instantSchema,
  replacesPlacementId: idSchema.nullable().default(null).describe('Planned or as-built placement this one replaces'),
  photoFileId: idSchema.nullable().default(null),
});
export type FieldLogInput = z.input<typeof fieldLogInputSchema>;

export const fieldLogSchema = z.object({
  id: idSchema,
  placement: placementSchema,
  assessmentId: idSchema.nullable().describe('The re-assessment this log queued'),
  gradeBefore: gradeSchema.nullable(),
  loggedAt: instantSchema,
  spanLabel: z.string(),
  lineName: z.string(),
  sectionId: idSchema,
  wireName: z.string(),
});
export type FieldLog = z.infer<typeof fieldLogSchema>;

const structureForFieldSchema = z.object({
  id: idSchema,
  name: z.string(),
  lineName: z.string(),
  kind: z.enum(['dead-end', 'suspension']),
  positionDeg: z.array(z.number()).length(2),
  plannedCount: z.number().int().describe('Planned dampers not yet fitted at this structure'),
});
const spanWireAtStructureSchema = z.object({
  spanWireId: idSchema,
  spanId: idSchema,
  spanLabel: z.string(),
  sectionId: idSchema,
  otherStructureName: z.string(),
  spanLengthM: z.number(),
  side: sideSchema,
  wireId: idSchema,
  wireName: z.string(),
  conductorName: z.string(),
  grade: gradeSchema.nullable(),
  isStale: z.boolean(),
  placements: z.array(placementSchema).describe('Standing placements at this side'),
});
export const structureWorkSchema = z.object({
  structure: structureForFieldSchema,
  spanWires: z.array(spanWireAtStructureSchema),
});
export type StructureWork = z.infer<typeof structureWorkSchema>;

const planners = ['engineer'] as const;
const fitters = ['crew', 'engineer'] as const;
const readers = ['engineer', 'crew', 'manager', 'safety-officer', 'admin'] as const;

export const placementRoutes = {
  createPlannedPlacement: route({
    method: 'post',
    path: '/placements',
    summary: 'Plan a damper',
    access: planners,
    body: plannedPlacementInputSchema,
    response: placementSchema,
    status: 201,
    problems: ['invalid-input', 'not-signed-in', 'not-allowed', 'not-found', 'duplicate', 'csrf-refused'],
    isIdempotent: true,
  }),
  removePlannedPlacement: route({
    method: 'delete',
    path: '/placements/:placementId',
    summary: 'Withdraw a planned damper; the history keeps it',
    access: planners,
    params: z.object({ placementId: idSchema }),
    response: null,
    status: 204,
    problems: [
      'not-signed-in',
      'not-allowed',
      'not-found',
      'wrong-state',
      'stale-version',
      'version-required',
      'csrf-refused',
    ],
    needsVersion: true,
  }),
  listFieldStructures: route({
    method: 'get',
    path: '/field/structures',
    summary: 'Structures to log at: by name, or those with planned work',
    access: fitters,
    query: z.object({ ...pageQuery, search: z.string().max(100).optional() }),
    response: pageOf(structureForFieldSchema),
    status: 200,
    problems: ['invalid-input', 'not-signed-in', 'not-allowed'],
  }),
  getFieldStructure: route({
    method: 'get',
    path: '/field/structures/:structureId',
    summary: 'Span wires that end at a structure, with their dampers',
    access: fitters,
    params: z.object({ structureId: idSchema }),
    response: structureWorkSchema,
    status: 200,
    problems: ['not-signed-in', 'not-allowed', 'not-found'],
  }),
  createFieldLog: route({
    method: 'post',
    path: '/field/logs',
    summary: 'Log a fitted damper; makes the finding stale and queues a re-assessment',
    access: fitters,
    body: fieldLogInputSchema,
    response: fieldLogSchema,
    status: 201,
    problems: [
      'invalid-input',
      'not-signed-in',
      'not-allowed',
      'not-found',
      'duplicate',
      'wrong-state',
      'csrf-refused',
    ],
    isIdempotent: true,
  }),
  listFieldLogs: route({
    method: 'get',
    path: '/field/logs',
    summary: 'Field logs, newest first',
    access: readers,
    query: z.object({ ...pageQuery, structureId: idSchema.optional(), sectionId: idSchema.optional() }),
    response: pageOf(fieldLogSchema),
    status: 200,
    problems: ['invalid-input', 'not-signed-in', 'not-allowed'],
  }),
  uploadPhoto: route({
    method: 'post',
    path: '/field/photos/:fileId',
    summary: 'Upload a photo (JPEG, PNG or WebP, up to 15 MB) under an id made by the client',
    access: fitters,
    params: z.object({ fileId: idSchema }),
    accepts: 'multipart',
    response: z.object({ id: idSchema, byteCount: z.number().int() }),
    status: 201,
    problems: ['invalid-input', 'not-signed-in', 'not-allowed', 'too-large', 'unsupported-file', 'csrf-refused'],
  }),
  getPhoto: route({
    method: 'get',
    path: '/field/photos/:fileId',
    summary: 'A photo of a fitted damper',
    access: readers,
    params: z.object({ fileId: idSchema }),
    response: null,
    status: 200,
    answers: 'file',
    problems: ['not-signed-in', 'not-allowed', 'not-found'],
  }),
};
