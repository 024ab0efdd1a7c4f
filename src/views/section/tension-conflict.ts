import { wireSchema } from '#shared/contract/sections.ts';
import type { Wire } from '#shared/contract/sections.ts';
import { ApiProblem } from '#src/api/api-problem.ts';

/**
 * The wire as somebody else saved it meanwhile, when an edit was refused because it was made on an older version;
 * null for every other outcome.
 */
export function savedMeanwhile(error: Error | null): Wire | null {
  if (!(error instanceof ApiProblem) || error.problem.code !== 'stale-version') return null;
  const current = wireSchema.safeParse(error.problem.current);
  return current.success ? current.data : null;
}
