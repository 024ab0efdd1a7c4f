import { z } from 'zod';
import { idSchema, instantSchema, pageOf, pageQuery } from './paging.ts';
import { roleSchema } from './roles.ts';
import { route } from './route.ts';

export const personSchema = z.object({
  id: idSchema,
  displayName: z.string(),
  email: z.string(),
  roles: z.array(roleSchema),
  lastSignedInAt: instantSchema.nullable(),
});
export const auditEntrySchema = z.object({
  id: z.string(),
  at: instantSchema,
  personName: z.string().nullable(),
  action: z.string(),
  thingKind: z.string(),
  thingId: z.string(),
  before: z.unknown(),
  after: z.unknown(),
  requestId: z.string().nullable(),
});
const problems = ['invalid-input', 'not-signed-in', 'not-allowed'] as const;
export const peopleRoutes = {
  listPeople: route({
    method: 'get',
    path: '/people',
    summary: 'People of the utility and their roles, as the identity provider last stated them',
    access: ['admin'],
    query: z.object(pageQuery),
    response: pageOf(personSchema),
    status: 200,
    problems,
  }),
  listAudit: route({
    method: 'get',
    path: '/audit',
    summary: 'Audit log, newest first',
    access: ['admin'],
    query: z.object({ ...pageQuery, thingKind: z.string().max(40).optional(), thingId: z.string().max(60).optional() }),
    response: pageOf(auditEntrySchema),
    status: 200,
    problems,
  }),
};
