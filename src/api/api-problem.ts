import type { Problem } from '#shared/contract/problem.ts';

/** A problem document as an error; screens switch on its code. */
export class ApiProblem extends Error {
  override readonly name = 'ApiProblem';
  readonly problem: Problem;

  constructor(problem: Problem) {
    super(problem.detail);
    this.problem = problem;
  }
}

/** A problem made here, when the service could not be reached or answered something else. */
export function localProblem(code: Problem['code'], title: string, detail: string): ApiProblem {
  return new ApiProblem({
    type: 'about:blank',
    title,
    status: 0,
    detail,
    instance: '',
    code,
    requestId: '',
    errors: [],
  });
}
