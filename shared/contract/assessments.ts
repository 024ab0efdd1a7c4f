import { z } from 'zod';
import { findingSummarySchema, methodNoteSchema } from './findings.ts';
import { gradeSchema } from './grades.ts';
import { idSchema, instantSchema, listQuery, pageOf, pageQuery } from './paging.ts';
import { route } from './route.ts';

export const assessmentStates = ['queued', 'running', 'done', 'failed', 'cancelled'] as const;
export const assessmentStateSchema = z.enum(assessmentStates);
export type AssessmentState = z.infer<typeof assessmentStateSchema>;

export const selectionSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('spans'), spanIds: z.array(idSchema).min(1, 'pick at least one span').max(20_000) }),
  z.strictObject({ kind: z.literal('sections'), sectionIds: z.array(idSchema).min(1).max(20_000) }),
  z.strictObject({ kind: z.literal('lines'), lineIds: z.array(idSchema).min(1).max(2_000) }),
  z.strictObject({ kind: z.literal('whole-network') }),
]);
export type Selection = z.infer<typeof selectionSchema>;

export const assessmentInputSchema = z.strictObject({
  id: idSchema.optional().describe('Made by the client, if it likes'),
  basisId: idSchema.optional().describe('The default basis of the utility when left out'),
  title: z.string().trim().max(120).default(''),
  selection: selectionSchema,
});

export const assessmentSchema = z.object({
  id: idSchema,
  title: z.string(),
  state: assessmentStateSchema,
  step: z.enum(['waiting', 'freezing-input', 'computing', 'finishing', 'ended']),
  doneCount: z.number().int(),
  totalCount: z.number().int().describe('Span wires to assess; 0 until the input is frozen'),
  gradeCounts: z.object({
    calm: z.number().int(),
    notice: z.number().int(),
    act: z.number().int(),
    urgent: z.number().int(),
  }),
  basisId: idSchema,
  basisName: z.string(),
  basisVersionNumber: z.number().int(),
  cause: z.enum(['engineer', 'field-log']),
  engineVersion: z.string().nullable(),
  methods: z.array(methodNoteSchema),
  createdByName: z.string().nullable(),
  createdAt: instantSchema,
  startedAt: instantSchema.nullable(),
  endedAt: instantSchema.nullable(),
  failureDetail: z.string().nullable(),
});
export type Assessment = z.infer<typeof assessmentSchema>;

/** Event of the progress stream; the stream ends after an event whose state is an end state. */
export const assessmentProgressSchema = assessmentSchema.pick({
  id: true,
  state: true,
  step: true,
  doneCount: true,
  totalCount: true,
});
export type AssessmentProgress = z.infer<typeof assessmentProgressSchema>;

export const assessmentFindingSchema = findingSummarySchema.extend({
  spanId: idSchema,
  sectionId: idSchema,
  spanLabel: z.string(),
  wireName: z.string(),
  lineName: z.string(),
});

const readers = ['engineer', 'manager', 'safety-officer', 'crew', 'admin'] as const;
const params = z.object({ assessmentId: idSchema });
const readProblems = ['not-signed-in', 'not-allowed', 'not-found'] as const;
const actProblems = ['not-signed-in', 'not-allowed', 'not-found', 'wrong-state', 'csrf-refused'] as const;
export const assessmentRoutes = {
  listAssessments: route({
    method: 'get',
    path: '/assessments',
    summary: 'Assessments, newest first',
    access: readers,
    query: z.object({ ...pageQuery, states: listQuery(assessmentStateSchema).optional() }),
    response: pageOf(assessmentSchema),
    status: 200,
    problems: ['invalid-input', 'not-signed-in', 'not-allowed'],
  }),
  createAssessment: route({
    method: 'post',
    path: '/assessments',
    summary: 'Assess picked spans against a basis',
    access: ['engineer'],
    body: assessmentInputSchema,
    response: assessmentSchema,
    status: 202,
    problems: ['invalid-input', 'not-signed-in', 'not-allowed', 'not-found', 'csrf-refused', 'idempotency-mismatch'],
    isIdempotent: true,
  }),
  getAssessment: route({
    method: 'get',
    path: '/assessments/:assessmentId',
    summary: 'One assessment with its progress',
    access: readers,
    params,
    response: assessmentSchema,
    status: 200,
    problems: readProblems,
  }),
  watchAssessment: route({
    method: 'get',
    path: '/assessments/:assessmentId/events',
    summary: 'Progress as server-sent events',
    access: readers,
    params,
    response: assessmentProgressSchema,
    status: 200,
    answers: 'events',
    problems: readProblems,
  }),
  listAssessmentFindings: route({
    method: 'get',
    path: '/assessments/:assessmentId/findings',
    summary: 'Findings of an assessment, worst first',
    access: readers,
    params,
    query: z.object({ ...pageQuery, grades: listQuery(gradeSchema).optional() }),
    response: pageOf(assessmentFindingSchema),
    status: 200,
    problems: ['invalid-input', ...readProblems],
  }),
  cancelAssessment: route({
    method: 'post',
    path: '/assessments/:assessmentId/cancel',
    summary: 'Stop an assessment; what is computed is kept, nothing of it becomes current',
    access: ['engineer'],
    params,
    response: assessmentSchema,
    status: 200,
    problems: actProblems,
  }),
  retryAssessment: route({
    method: 'post',
    path: '/assessments/:assessmentId/retry',
    summary: 'Go on with a failed or cancelled assessment at its missing chunks',
    access: ['engineer'],
    params,
    response: assessmentSchema,
    status: 202,
    problems: actProblems,
  }),
};
