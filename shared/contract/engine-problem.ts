import type { z } from 'zod';
import type { Problem } from './problem.ts';

/** Problem document of the command line: as the service's, without what only a request has. */
export type EngineProblem = Pick<Problem, 'type' | 'title' | 'status' | 'detail' | 'code' | 'errors'>;

type Issue = z.core.$ZodIssue;
type FieldError = EngineProblem['errors'][number];

const errorLimitCount = 20;

/** JSON pointer of a path of keys. */
function pointerOf(path: readonly PropertyKey[]): string {
  return path.map((key) => `/${String(key).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');
}

/** JSON pointer of a path as the engine writes it: ends[0].dampers[1].distanceM. */
export function pointerOfEnginePath(path: string): string {
  return pointerOf(path.split(/[.[\]]+/).filter((key) => key !== ''));
}

/** The alternative of a union that the input most likely meant: fewest complaints, then the deepest. */
function nearestAlternative(alternatives: readonly (readonly Issue[])[]): readonly Issue[] {
  const depth = (issues: readonly Issue[]) => Math.max(0, ...issues.map((issue) => issue.path.length));
  const isAboutKeys = (issue: Issue) => issue.code === 'unrecognized_keys' || issue.message === 'is required';
  const rank = (issues: readonly Issue[]) =>
    issues.filter(isAboutKeys).length * 1000 + issues.length * 10 - depth(issues);
  return [...alternatives].sort((a, b) => rank(a) - rank(b))[0] ?? [];
}

/**
 * Field errors of a failed parse, one per wrong field, unions told by the alternative that was most likely meant.
 *
 * @param issues as zod reports them
 * @param at path of the value within the document
 * @returns pointers and messages, at most twenty
 */
export function fieldErrors(issues: readonly Issue[], at: readonly PropertyKey[] = []): FieldError[] {
  const errors = issues.flatMap((issue): FieldError[] => {
    const path = [...at, ...issue.path];
    if (issue.code === 'invalid_union' && issue.errors.length > 0) {
      return fieldErrors(nearestAlternative(issue.errors), path);
    }
    if (issue.code === 'unrecognized_keys') {
      return issue.keys.map((key) => ({ pointer: pointerOf([...path, key]), message: 'is not known here' }));
    }
    const isMissing = issue.code === 'invalid_type' && issue.message.endsWith('received undefined');
    return [{ pointer: pointerOf(path), message: isMissing ? 'is required' : issue.message }];
  });
  return errors.slice(0, errorLimitCount);
}

/** Problem document for input that the engine does not take. */
export function engineProblem(
  code: 'invalid-input' | 'malformed-body' | 'too-large',
  errors: FieldError[],
): EngineProblem {
  const titles = {
    'invalid-input': 'The input is not valid',
    'malformed-body': 'The input is not a JSON document',
    'too-large': 'The input is too large',
  };
  const first = errors[0];
  const where = first === undefined || first.pointer === '' ? 'The document' : first.pointer;
  return {
    type: `urn:stillspan:problem:${code}`,
    title: titles[code],
    status: code === 'too-large' ? 413 : 400,
    detail: first === undefined ? titles[code] : `${where} ${first.message}`,
    code,
    errors,
  };
}
