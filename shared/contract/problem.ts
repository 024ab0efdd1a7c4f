import { z } from 'zod';

/** Every problem code the service can answer with; screens switch on these. */
export const problemCodes = [
  'invalid-input',
  'malformed-body',
  'not-signed-in',
  'csrf-refused',
  'not-allowed',
  'not-found',
  'stale-version',
  'version-required',
  'duplicate',
  'wrong-state',
  'in-use',
  'idempotency-mismatch',
  'too-large',
  'too-many-requests',
  'unsupported-file',
  'upstream-failed',
  'internal',
] as const;
export const problemCodeSchema = z.enum(problemCodes);
export type ProblemCode = z.infer<typeof problemCodeSchema>;

/** Problem document, RFC 9457, with a code and the fields that were wrong. */
export const problemSchema = z.object({
  type: z.string().describe('URI reference that names the kind of problem'),
  title: z.string(),
  status: z.number().int(),
  detail: z.string(),
  instance: z.string(),
  code: problemCodeSchema,
  requestId: z.string(),
  errors: z.array(z.object({ pointer: z.string().describe('JSON pointer of the field'), message: z.string() })),
  current: z.unknown().optional().describe('With stale-version: the version now stored'),
  submitted: z.unknown().optional().describe('With stale-version: what was sent'),
});
export type Problem = z.infer<typeof problemSchema>;
