import type { z } from 'zod';
import type { ProblemCode } from './problem.ts';
import type { Role } from './roles.ts';

export type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';

/** One route of the API: the one definition that server, client and OpenAPI document share. Paths are below /api/v1. */
export interface RouteDefinition {
  readonly method: Method;
  readonly path: string;
  readonly summary: string;
  /** Who may call it: anybody, any signed-in person, or holders of one of the roles. */
  readonly access: 'public' | 'signed-in' | readonly Role[];
  readonly params?: z.ZodObject;
  readonly query?: z.ZodObject;
  readonly body?: z.ZodType;
  /** What a success answers; null for no content. */
  readonly response: z.ZodType | null;
  readonly status: 200 | 201 | 202 | 204;
  readonly problems: readonly ProblemCode[];
  /** `json` by default; `events` is a server-sent event stream of `response`; `file` sends bytes. */
  readonly answers?: 'json' | 'events' | 'file';
  /** `multipart` routes read one file and, beside it, the fields of `body`. */
  readonly accepts?: 'json' | 'multipart';
  /** Takes an Idempotency-Key header: the same key and body answer the first result again. */
  readonly isIdempotent?: boolean;
  /** Needs If-Match with the version that was read. */
  readonly needsVersion?: boolean;
}

/** Keeps the literal types of a route and checks its shape. */
export function route<const T extends RouteDefinition>(definition: T): T {
  return definition;
}

type InferOr<T, Fallback> = T extends z.ZodType ? z.infer<T> : Fallback;
type InputOr<T, Fallback> = T extends z.ZodType ? z.input<T> : Fallback;
export type ParamsOf<R extends RouteDefinition> = InferOr<R['params'], Record<string, never>>;
export type QueryOf<R extends RouteDefinition> = InferOr<R['query'], Record<string, never>>;
export type QueryInputOf<R extends RouteDefinition> = InputOr<R['query'], Record<string, never>>;
export type BodyOf<R extends RouteDefinition> = InferOr<R['body'], undefined>;
export type BodyInputOf<R extends RouteDefinition> = InputOr<R['body'], undefined>;
export type ResponseOf<R extends RouteDefinition> = InferOr<R['response'], null>;
