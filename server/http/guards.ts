import { timingSafeEqual } from 'node:crypto';
import type { Request } from 'express';
import type { RouteDefinition } from '#shared/contract/route.ts';
import { AppError } from '#server/platform/errors.ts';

/** Who is signed in, or a refusal. */
export function signedIn(request: Request): Express.User {
  if (request.user === undefined || request.user === null)
    throw new AppError('not-signed-in', 'Nobody is signed in, or the session has ended.');
  return request.user;
}

/** Refuses people whose roles do not open the route. */
export function guardAccess(definition: RouteDefinition, request: Request): void {
  if (definition.access === 'public') return;
  const person = signedIn(request);
  if (definition.access === 'signed-in') return;
  if (definition.access.some((role) => person.roles.includes(role))) return;
  throw new AppError(
    'not-allowed',
    `This needs the role ${definition.access.join(' or ')}; you hold ${person.roles.join(', ')}.`,
  );
}

function equalInConstantTime(given: string, expected: string): boolean {
  const a = Buffer.from(given);
  const b = Buffer.from(expected);
  return a.length === b.length && timingSafeEqual(a, b);
}

/** Refuses changing requests that do not carry the token of the session. */
export function guardCsrf(request: Request, given: string | undefined): void {
  const expected = request.user?.csrfToken;
  if (expected !== undefined && given !== undefined && equalInConstantTime(given, expected)) return;
  throw new AppError('csrf-refused', 'The X-CSRF-Token header does not match the session. Load the page again.');
}

/** Version named by If-Match; the header is needed on edits so that nobody overwrites what they have not seen. */
export function versionOf(definition: RouteDefinition, request: Request): number | null {
  if (definition.needsVersion !== true) return null;
  const match = /^(?:W\/)?"(\d{1,9})"$/.exec(request.get('If-Match') ?? '');
  if (match?.[1] !== undefined) return Number(match[1]);
  throw new AppError('version-required', 'Send If-Match with the version that was read, e.g. If-Match: "3".', {
    errors: [{ pointer: '/headers/if-match', message: 'must be the version in double quotes' }],
  });
}
