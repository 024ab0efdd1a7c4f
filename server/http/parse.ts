import type { z } from 'zod';
import type { RouteDefinition } from '#shared/contract/route.ts';
import { AppError, type FieldError } from '#server/platform/errors.ts';

type Part = 'params' | 'query' | 'body';

function shown(input: unknown): string {
  if (input === undefined || typeof input === 'object') return '';
  const text = JSON.stringify(input);
  return text.length > 60 ? ` (got ${text.slice(0, 57)}…)` : ` (got ${text})`;
}

function at(input: unknown, path: readonly PropertyKey[]): unknown {
  return path.reduce<unknown>(
    (value, key) => (typeof value === 'object' && value !== null ? Reflect.get(value, key) : undefined),
    input,
  );
}

/** Field errors of a failed parse: where, what is wrong, what stood there. */
export function fieldErrors(error: z.ZodError, input: unknown, prefix = ''): FieldError[] {
  return error.issues.slice(0, 50).map((issue) => ({
    pointer: `${prefix}/${issue.path.map((key) => String(key).replaceAll('~', '~0').replaceAll('/', '~1')).join('/')}`,
    message: `${issue.message}${shown(at(input, issue.path))}`,
  }));
}

/** Parses one part of a request with the schema of its route; a wrong part is refused field by field. */
export function parsePart(definition: RouteDefinition, part: Part, input: unknown): unknown {
  const schema = definition[part];
  if (schema === undefined) return part === 'body' ? undefined : {};
  const parsed = schema.safeParse(input);
  if (parsed.success) return parsed.data;
  const errors = fieldErrors(parsed.error, input, part === 'body' ? '' : `/${part}`);
  const [first] = errors;
  throw new AppError(
    'invalid-input',
    first === undefined ? 'The request is not allowed.' : `${first.pointer}: ${first.message}.`,
    { errors },
  );
}
