import { z } from 'zod';
import { AppError } from '#server/platform/errors.ts';

const driverError = z.object({ code: z.string(), constraint: z.string().optional(), detail: z.string().optional() });

/** Turns what the driver throws into errors the rest of the code knows; anything else passes through as it is. */
export function translateDatabaseError(error: unknown): unknown {
  const parsed = driverError.safeParse(error);
  if (!parsed.success) return error;
  const { code, constraint = 'a rule of the database' } = parsed.data;
  switch (code) {
    case '23505':
      return new AppError('duplicate', `The same thing is already stored (${constraint}).`, { cause: error });
    case '23503':
      return new AppError('not-found', `A record this one refers to does not exist (${constraint}).`, { cause: error });
    case '23514':
      return new AppError('invalid-input', `A value is outside what the database allows (${constraint}).`, {
        cause: error,
      });
    case '42501':
      return new AppError('not-allowed', 'The database refused this for the utility that is signed in.', {
        cause: error,
      });
    default:
      return error;
  }
}
