import { z } from 'zod';
import { outcomeSchema } from './findings.ts';
import { gradeSchema } from './grades.ts';
import { booleanQuery, idSchema, instantSchema, listQuery, pageOf, pageQuery } from './paging.ts';
import { reasonSchema } from './reasons.ts';
import { route } from './route.ts';

export const riskSortKeys = ['grade', 'utilisation', 'stress', 'life', 'span-length', 'line', 'assessed-at'] as const;
export const riskRowSchema = z.object({
  spanWireId: idSchema,
  spanId: idSchema,
  sectionId: idSchema,
  findingId: idSchema.nullable(),
  lineName: z.string(),
  sectionName: z.string(),
  spanLabel: z.string(),
  wireName: z.string(),
  conductorName: z.string(),
  spanLengthM: z.number(),
  tensionN: z.number(),
  ratedStrengthN: z.number(),
  grade: gradeSchema.nullable(),
  outcome: outcomeSchema.nullable(),
  utilisationRatio: z.number().nullable(),
  stressPa: z.number().nullable(),
  limitStressPa: z.number().nullable(),
  frequencyHz: z.number().nullable(),
  windSpeedMPerS: z.number().nullable(),
  lifeYears: z.number().nullable(),
  leadingReason: reasonSchema.nullable(),
  damperCount: z.number().int().describe('Dampers standing as built on this span wire'),
  isStale: z.boolean(),
  isAssumed: z.boolean(),
  assessedAt: instantSchema.nullable(),
});
export type RiskRow = z.infer<typeof riskRowSchema>;

export const riskQuerySchema = z.object({
  ...pageQuery,
  sort: z.enum(riskSortKeys).default('grade'),
  direction: z.enum(['ascending', 'descending']).default('descending'),
  grades: listQuery(gradeSchema).optional(),
  lineId: idSchema.optional(),
  sectionId: idSchema.optional(),
  search: z.string().max(100).optional(),
  isStale: booleanQuery.optional(),
  isAssessed: booleanQuery.optional(),
});

export const riskRoutes = {
  listRisk: route({
    method: 'get',
    path: '/risk',
    summary: 'Risk table over all span wires: sorted, filtered and paged by the server',
    access: ['engineer', 'manager', 'safety-officer', 'admin'],
    query: riskQuerySchema,
    response: pageOf(riskRowSchema),
    status: 200,
    problems: ['invalid-input', 'not-signed-in', 'not-allowed'],
  }),
};
