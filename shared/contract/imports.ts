import { z } from 'zod';
import { idSchema, instantSchema, pageOf, pageQuery } from './paging.ts';
import { roughnessMSchema, spanLengthMSchema, structureHeightMSchema, voltageVSchema } from './quantity.ts';
import { route } from './route.ts';

export const importKinds = ['surveyed', 'centre-line'] as const;

/** What is assumed for lines up to a voltage: the first entry whose `upToVoltageV` is not below the line's is taken. */
export const assumedVoltageClassSchema = z.strictObject({
  upToVoltageV: voltageVSchema,
  conductorName: z.string().min(1).max(80).describe('Name of a conductor type in the catalogue'),
  conductorStandard: z.string().max(80).optional().describe('Standard, when the name stands under several'),
  phaseWireCount: z.number().int().min(1).max(12).describe('Phase wires a span'),
  tensionRatedRatio: z.number().min(0.03).max(0.5).describe('Everyday tension over rated strength'),
  structureHeightM: structureHeightMSchema,
});

/** Choices for a layer of line geometry only: everything made from them is marked assumed. */
export const assumptionsSchema = z.strictObject({
  typicalSpanLengthM: spanLengthMSchema.default(350),
  deadEndFromTurnDeg: z
    .number()
    .min(1)
    .max(90)
    .default(10)
    .describe('Vertices that turn more than this become dead-ends'),
  minimumStretchLengthM: z
    .number()
    .min(0)
    .max(1000)
    .default(20)
    .describe('Shorter stretches (stubs into stations) are left out and named'),
  voltageClasses: z.array(assumedVoltageClassSchema).min(1).max(20),
});

export const importOptionsSchema = z.strictObject({
  kind: z.enum(importKinds),
  format: z.enum(['geojson', 'csv']),
  defaultRoughnessM: roughnessMSchema.optional(),
  properties: z
    .strictObject({
      lineName: z.string().max(80).default('line_name'),
      voltageKV: z.string().max(80).default('voltage_kv'),
    })
    .optional()
    .describe('Names of the properties or columns of a centre-line file'),
  assumptions: assumptionsSchema.optional().describe('Needed for centre-line files'),
  isDryRun: z.boolean().default(false).describe('Check and count only, save nothing'),
});
export type ImportOptions = z.infer<typeof importOptionsSchema>;

export const importStates = ['queued', 'running', 'done', 'refused', 'failed'] as const;
export const importErrorSchema = z.object({
  row: z.number().int().nullable().describe('Row of a CSV file (header is 1) or feature of a GeoJSON file (from 1)'),
  field: z.string().nullable(),
  value: z.string().nullable().describe('What stood there, shortened'),
  message: z.string().describe('What is wrong and what is allowed'),
});
export type ImportError = z.infer<typeof importErrorSchema>;

export const importRunSchema = z.object({
  id: idSchema,
  fileName: z.string(),
  options: importOptionsSchema,
  state: z.enum(importStates),
  step: z.enum(['waiting', 'reading', 'checking', 'saving', 'ended']),
  doneCount: z.number().int(),
  totalCount: z.number().int(),
  counts: z
    .object({
      lineCount: z.number().int(),
      sectionCount: z.number().int(),
      structureCount: z.number().int(),
      spanCount: z.number().int(),
      wireCount: z.number().int(),
      spanWireCount: z.number().int(),
      leftOutCount: z.number().int().describe('Features left out for a named reason that is not an error'),
    })
    .nullable(),
  errors: z.array(importErrorSchema).describe('First 500 errors; nothing is saved when there is one'),
  errorCount: z.number().int(),
  notices: z.array(importErrorSchema).describe('First 500 things left out or assumed'),
  extentDeg: z.array(z.number()).length(4).nullable(),
  createdByName: z.string().nullable(),
  createdAt: instantSchema,
  endedAt: instantSchema.nullable(),
});
export type ImportRun = z.infer<typeof importRunSchema>;
export const importProgressSchema = importRunSchema.pick({
  id: true,
  state: true,
  step: true,
  doneCount: true,
  totalCount: true,
});

const params = z.object({ importId: idSchema });
export const importRoutes = {
  createImport: route({
    method: 'post',
    path: '/imports',
    summary: 'Upload lines: parts `options` (JSON) and `file`, in that order; up to 40 MB',
    access: ['engineer'],
    accepts: 'multipart',
    body: importOptionsSchema,
    response: importRunSchema,
    status: 202,
    problems: ['invalid-input', 'not-signed-in', 'not-allowed', 'too-large', 'unsupported-file', 'csrf-refused'],
  }),
  listImports: route({
    method: 'get',
    path: '/imports',
    summary: 'Imports, newest first',
    access: ['engineer', 'admin'],
    query: z.object(pageQuery),
    response: pageOf(importRunSchema),
    status: 200,
    problems: ['invalid-input', 'not-signed-in', 'not-allowed'],
  }),
  getImport: route({
    method: 'get',
    path: '/imports/:importId',
    summary: 'One import with its errors and counts',
    access: ['engineer', 'admin'],
    params,
    response: importRunSchema,
    status: 200,
    problems: ['not-signed-in', 'not-allowed', 'not-found'],
  }),
  watchImport: route({
    method: 'get',
    path: '/imports/:importId/events',
    summary: 'Progress as server-sent events',
    access: ['engineer', 'admin'],
    params,
    response: importProgressSchema,
    status: 200,
    answers: 'events',
    problems: ['not-signed-in', 'not-allowed', 'not-found'],
  }),
};
