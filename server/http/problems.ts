import 'pino-http';
import type { ErrorRequestHandler, Request, RequestHandler, Response } from 'express';
import type { Problem, ProblemCode } from '#shared/contract/problem.ts';
import { AppError } from '#server/platform/errors.ts';

interface Kind {
  readonly status: number;
  readonly title: string;
}

const kinds: Readonly<Record<ProblemCode, Kind>> = {
  'invalid-input': { status: 400, title: 'Something sent is not allowed' },
  'malformed-body': { status: 400, title: 'The body cannot be read' },
  'not-signed-in': { status: 401, title: 'Sign in first' },
  'csrf-refused': { status: 403, title: 'The request did not come from this page' },
  'not-allowed': { status: 403, title: 'Not allowed' },
  'not-found': { status: 404, title: 'Not found' },
  'stale-version': { status: 409, title: 'Somebody else changed it meanwhile' },
  'version-required': { status: 412, title: 'Say which version is edited' },
  duplicate: { status: 409, title: 'Already there' },
  'wrong-state': { status: 409, title: 'Not possible in this state' },
  'in-use': { status: 409, title: 'Still in use' },
  'idempotency-mismatch': { status: 409, title: 'The key was used for something else' },
  'too-large': { status: 413, title: 'Too large' },
  'too-many-requests': { status: 429, title: 'Too many requests' },
  'unsupported-file': { status: 400, title: 'This kind of file is not taken' },
  'upstream-failed': { status: 503, title: 'A service this one needs does not answer' },
  internal: { status: 500, title: 'The service failed' },
};

const genericDetail = 'The failure is logged under this request id; nothing was changed.';

/** Builds the problem document of an error; only expected errors show their text. */
function problemOf(error: unknown, request: Request): Problem {
  const known = error instanceof AppError ? error : null;
  const code = known?.code ?? 'internal';
  return {
    type: `/problems/${code}`,
    title: kinds[code].title,
    status: kinds[code].status,
    detail: known?.message ?? genericDetail,
    instance: request.originalUrl.split('?')[0] ?? '/',
    code,
    requestId: String(request.id),
    errors: [...(known?.errors ?? [])],
    ...(known?.current === undefined ? {} : { current: known.current }),
    ...(known?.submitted === undefined ? {} : { submitted: known.submitted }),
  };
}

function sendProblem(response: Response, problem: Problem): void {
  response.status(problem.status).type('application/problem+json').send(JSON.stringify(problem));
}

/** The one place where errors become answers. */
export const problemHandler: ErrorRequestHandler = (error: unknown, request, response, next) => {
  if (response.headersSent) return next(error);
  const problem = problemOf(error, request);
  if (problem.status >= 500) request.log.error({ err: error }, 'request failed');
  else request.log.info({ code: problem.code, detail: problem.detail }, 'request refused');
  sendProblem(response, problem);
};

/** Answers unknown API paths. */
export const unknownPath: RequestHandler = (request, _response, next) => {
  next(new AppError('not-found', `There is nothing at ${request.method} ${request.path}.`));
};
