import { z } from 'zod';
import { gradeSchema } from './grades.ts';
import { idSchema, listQuery, pageOf, pageQuery } from './paging.ts';
import { route } from './route.ts';

const readers = ['engineer', 'crew', 'manager', 'safety-officer', 'admin'] as const;
const readProblems = ['invalid-input', 'not-signed-in', 'not-allowed'] as const;

export const lineSchema = z.object({
  id: idSchema,
  name: z.string(),
  voltageV: z.number().nullable(),
  sectionCount: z.number().int(),
  spanCount: z.number().int(),
  lengthM: z.number(),
  grade: gradeSchema.nullable(),
  isAssumed: z.boolean(),
  extentDeg: z.array(z.number()).length(4),
});
export type Line = z.infer<typeof lineSchema>;

export const spanListItemSchema = z.object({
  id: idSchema,
  label: z.string(),
  sectionId: idSchema,
  sectionName: z.string(),
  lineId: idSchema,
  lineName: z.string(),
  spanLengthM: z.number(),
  spanWireCount: z.number().int(),
  grade: gradeSchema.nullable(),
  isStale: z.boolean(),
  isAssumed: z.boolean(),
  centreDeg: z.array(z.number()).length(2),
});
export type SpanListItem = z.infer<typeof spanListItemSchema>;

export const lineRoutes = {
  listLines: route({
    method: 'get',
    path: '/lines',
    summary: 'Lines by name',
    access: readers,
    query: z.object({ ...pageQuery, search: z.string().max(100).optional() }),
    response: pageOf(lineSchema),
    status: 200,
    problems: readProblems,
  }),
  listSpans: route({
    method: 'get',
    path: '/spans',
    summary: 'Spans, by box, line, section or ids; the list the map picks from',
    access: readers,
    query: z.object({
      ...pageQuery,
      limitCount: z.coerce.number().int().min(1).max(2000).default(100),
      search: z.string().max(100).optional().describe('Part of the line, section or structure name'),
      lineId: idSchema.optional(),
      sectionId: idSchema.optional(),
      spanIds: listQuery(idSchema).optional(),
      grades: listQuery(gradeSchema).optional(),
      bboxDeg: z
        .string()
        .transform((text) => text.split(',').map(Number))
        .pipe(z.array(z.number().min(-360).max(360)).length(4))
        .optional(),
    }),
    response: pageOf(spanListItemSchema),
    status: 200,
    problems: readProblems,
  }),
};
