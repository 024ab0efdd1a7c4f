import { z } from 'zod';
import { gradeSchema } from './grades.ts';
import { idSchema, instantSchema, listQuery, pageOf, pageQuery, versionNumberSchema } from './paging.ts';
import { reasonSchema } from './reasons.ts';
import { route } from './route.ts';

export const alertStates = ['open', 'acknowledged', 'closed'] as const;
export const alertStateSchema = z.enum(alertStates);

export const alertSchema = z.object({
  id: idSchema,
  state: alertStateSchema,
  grade: gradeSchema,
  spanWireId: idSchema,
  spanId: idSchema,
  sectionId: idSchema,
  findingId: idSchema,
  lineName: z.string(),
  spanLabel: z.string(),
  wireName: z.string(),
  leadingReason: reasonSchema.nullable(),
  openedAt: instantSchema,
  acknowledgedAt: instantSchema.nullable(),
  acknowledgedByName: z.string().nullable(),
  closedAt: instantSchema.nullable(),
  closedByName: z.string().nullable(),
  note: z.string(),
  deliveries: z.array(
    z.object({
      recipientName: z.string(),
      state: z.enum(['waiting', 'sent', 'failed']),
      sentAt: instantSchema.nullable(),
      isDigest: z.boolean(),
      attemptCount: z.number().int(),
      failureDetail: z.string().nullable(),
    }),
  ),
  versionNumber: versionNumberSchema,
});
export type Alert = z.infer<typeof alertSchema>;

const alertAction = (action: 'acknowledge' | 'close', summary: string) =>
  route({
    method: 'post',
    path: `/alerts/:alertId/${action}` as const,
    summary,
    access: ['safety-officer'],
    params: z.object({ alertId: idSchema }),
    body: z.strictObject({ note: z.string().trim().max(1000).default('') }),
    response: alertSchema,
    status: 200,
    problems: ['invalid-input', 'not-signed-in', 'not-allowed', 'not-found', 'wrong-state', 'csrf-refused'],
  });

export const alertRoutes = {
  listAlerts: route({
    method: 'get',
    path: '/alerts',
    summary: 'Alerts, open ones first, newest first',
    access: ['engineer', 'manager', 'safety-officer', 'admin'],
    query: z.object({ ...pageQuery, states: listQuery(alertStateSchema).optional() }),
    response: pageOf(alertSchema),
    status: 200,
    problems: ['invalid-input', 'not-signed-in', 'not-allowed'],
  }),
  acknowledgeAlert: alertAction('acknowledge', 'Say that the alert is seen and dealt with'),
  closeAlert: alertAction('close', 'Close an alert'),
};
