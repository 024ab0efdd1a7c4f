import type { ProblemCode } from '#shared/contract/problem.ts';

export interface FieldError {
  readonly pointer: string;
  readonly message: string;
}

interface Details {
  readonly cause?: unknown;
  readonly errors?: readonly FieldError[];
  readonly current?: unknown;
  readonly submitted?: unknown;
}

/** An expected failure with a problem code; the HTTP edge maps the code to a status, jobs print the message. */
export class AppError extends Error {
  override readonly name = 'AppError';
  readonly code: ProblemCode;
  readonly errors: readonly FieldError[];
  readonly current: unknown;
  readonly submitted: unknown;

  constructor(code: ProblemCode, detail: string, details: Details = {}) {
    super(detail, { cause: details.cause });
    this.code = code;
    this.errors = details.errors ?? [];
    this.current = details.current;
    this.submitted = details.submitted;
  }
}

/** The thing is not there, or belongs to another utility: both read the same from outside. */
export function notFound(thing: string, id: string): AppError {
  return new AppError('not-found', `There is no ${thing} with the id ${id}.`);
}

/** One field is wrong. */
export function invalidField(pointer: string, message: string): AppError {
  return new AppError('invalid-input', `${pointer}: ${message}`, { errors: [{ pointer, message }] });
}
