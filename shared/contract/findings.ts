import { z } from 'zod';
import { gradeSchema } from './grades.ts';
import { idSchema, instantSchema, pageOf, pageQuery } from './paging.ts';
import { reasonSchema } from './reasons.ts';
import { route } from './route.ts';

/** `refused`: the engine did not take the input; the reason says why. */
export const outcomes = ['steady', 'quiet', 'amplitude-limit', 'no-damper-data', 'refused'] as const;
export const outcomeSchema = z.enum(outcomes);

export const methodNoteSchema = z.object({ name: z.string(), standing: z.string(), source: z.string() });
export const warningSchema = z.object({ code: z.string(), text: z.string() });

const findingSummary = {
  id: idSchema,
  assessmentId: idSchema,
  spanWireId: idSchema,
  outcome: outcomeSchema,
  grade: gradeSchema,
  utilisationRatio: z.number().nullable().describe('Worst stress or strain over its limit'),
  stressPa: z.number().nullable(),
  limitStressPa: z.number().nullable(),
  frequencyHz: z.number().nullable(),
  windSpeedMPerS: z.number().nullable(),
  amplitudeM: z.number().nullable(),
  lifeYears: z.number().nullable().describe('Null: no climate, or no end of life'),
  reasons: z.array(reasonSchema),
  assessedAt: instantSchema,
};
export const findingSummarySchema = z.object(findingSummary);
export type FindingSummary = z.infer<typeof findingSummarySchema>;

export const findingSchema = z.object({
  ...findingSummary,
  basisName: z.string(),
  basisVersionNumber: z.number().int(),
  engineVersion: z.string(),
  methods: z.array(methodNoteSchema),
  warnings: z.array(warningSchema),
  spanLabel: z.string(),
  wireName: z.string(),
  sectionId: idSchema,
  isCurrent: z.boolean(),
  input: z.record(z.string(), z.unknown()).describe('The frozen input, as the engine took it'),
});
export type Finding = z.infer<typeof findingSchema>;

const pair = <T extends z.ZodType>(value: T) => z.tuple([value, value]).describe('[first structure, second structure]');
export const seriesRowSchema = z.object({
  frequencyHz: z.number(),
  windSpeedMPerS: z.number(),
  outcome: outcomeSchema,
  midAmplitudeM: z.number().nullable(),
  clampStressPa: pair(z.number().nullable()),
  reflectionRatio: pair(z.number().nullable()),
  windPowerW: z.number().nullable(),
  selfDampingPowerW: z.number().nullable(),
  endPowerW: pair(z.number().nullable()),
});
export const findingSeriesSchema = z.object({
  findingId: idSchema,
  limitStressPa: z.number().nullable(),
  limitSource: z.string(),
  damperedLimitStressPa: z
    .number()
    .nullable()
    .describe('Strain limit for ends with dampers, as stress at the outer strand'),
  rows: z.array(seriesRowSchema),
  profile: z
    .object({
      frequencyHz: z.number(),
      positionsM: z.array(z.number()),
      amplitudesM: z.array(z.number()),
      fluxesW: z.array(z.number()).describe('Net travelling-wave energy flux towards the second structure'),
    })
    .nullable(),
  isReproduced: z.boolean().describe('True when today’s engine is the version that made the finding'),
});
export type FindingSeries = z.infer<typeof findingSeriesSchema>;

const readers = ['engineer', 'crew', 'manager', 'safety-officer', 'admin'] as const;
const problems = ['invalid-input', 'not-signed-in', 'not-allowed', 'not-found'] as const;
export const findingRoutes = {
  getFinding: route({
    method: 'get',
    path: '/findings/:findingId',
    summary: 'A finding with reasons, methods, warnings and its frozen input',
    access: readers,
    params: z.object({ findingId: idSchema }),
    response: findingSchema,
    status: 200,
    problems,
  }),
  getFindingSeries: route({
    method: 'get',
    path: '/findings/:findingId/series',
    summary: 'Curves behind a finding, computed again from its frozen input',
    access: readers,
    params: z.object({ findingId: idSchema }),
    query: z.object({
      frequencyHz: z.coerce
        .number()
        .positive()
        .max(500)
        .optional()
        .describe('Frequency of the flux profile; the worst one when left out'),
    }),
    response: findingSeriesSchema,
    status: 200,
    problems,
  }),
  listSpanWireFindings: route({
    method: 'get',
    path: '/span-wires/:spanWireId/findings',
    summary: 'Every finding of a span wire, newest first',
    access: readers,
    params: z.object({ spanWireId: idSchema }),
    query: z.object(pageQuery),
    response: pageOf(z.object({ ...findingSummary, basisName: z.string(), basisVersionNumber: z.number().int() })),
    status: 200,
    problems,
  }),
};
