import { z } from 'zod';
import { idSchema } from './paging.ts';
import { roleSchema } from './roles.ts';
import { route } from './route.ts';

export const sessionSchema = z.object({
  person: z.object({ id: idSchema, displayName: z.string(), email: z.string() }),
  utility: z.object({ id: idSchema, code: z.string(), name: z.string(), currencyCode: z.string() }),
  roles: z.array(roleSchema),
  csrfToken: z.string().describe('Send it back as X-CSRF-Token with every changing request'),
  idleTimeoutMs: z.number().int(),
  tileUrl: z.string().nullable().describe('Tile server template, if one is configured'),
});
export type Session = z.infer<typeof sessionSchema>;

export const sessionRoutes = {
  getSession: route({
    method: 'get',
    path: '/session',
    summary: 'Who is signed in, for which utility, with which roles',
    access: 'signed-in',
    response: sessionSchema,
    status: 200,
    problems: ['not-signed-in'],
  }),
};
