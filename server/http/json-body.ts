import express, { type ErrorRequestHandler, type RequestHandler } from 'express';
import { z } from 'zod';
import { AppError } from '#server/platform/errors.ts';

const limitBytes = 2 * 1024 * 1024;

/** Reads JSON bodies up to 2 MB. */
export const jsonBody: RequestHandler = express.json({
  limit: limitBytes,
  strict: false,
  type: ['application/json', 'application/*+json'],
});

const parserError = z.object({ type: z.string(), body: z.string().optional(), message: z.string() });

/** The field before a number that JSON cannot carry, so that the message can name it. */
function fieldBeforeBareWord(body: string): { field: string; word: string } | null {
  const match = /"([^"]{1,80})"\s*:\s*\[?(?:[^"[\]{}]*,)?\s*(-?(?:NaN|Infinity)|undefined)\b/.exec(body);
  return match?.[1] !== undefined && match[2] !== undefined ? { field: match[1], word: match[2] } : null;
}

/** Names what is wrong with a body that cannot be read. */
export const bodyErrors: ErrorRequestHandler = (error: unknown, _request, _response, next) => {
  const parsed = parserError.safeParse(error);
  if (!parsed.success) return next(error);
  const { type, body = '', message } = parsed.data;
  if (type === 'entity.too.large')
    return next(new AppError('too-large', `The body is larger than ${limitBytes} bytes.`));
  if (type === 'charset.unsupported' || type === 'encoding.unsupported') {
    return next(new AppError('malformed-body', 'The body must be UTF-8 JSON.'));
  }
  if (type !== 'entity.parse.failed') return next(error);
  const bare = fieldBeforeBareWord(body);
  if (bare === null) return next(new AppError('malformed-body', `The body is not JSON: ${message}.`));
  const text = `must be a finite number; ${bare.word} is not one`;
  next(
    new AppError('malformed-body', `${bare.field} ${text}.`, {
      errors: [{ pointer: `/${bare.field}`, message: text }],
    }),
  );
};
