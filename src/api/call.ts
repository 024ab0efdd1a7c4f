import type { z } from 'zod';
import { problemSchema } from '#shared/contract/problem.ts';
import type { BodyInputOf, ParamsOf, QueryInputOf, ResponseOf, RouteDefinition } from '#shared/contract/route.ts';
import { apiPrefix, apiRoutes, type ApiRoutes, type RouteName } from '#shared/contract/routes.ts';
import { ApiProblem, localProblem } from './api-problem.ts';

type Optional<K extends string, T> = [T] extends [Record<string, never> | undefined]
  ? { readonly [P in K]?: never }
  : { readonly [P in K]: T };
type BodyOfCall<R extends RouteDefinition> = R extends { accepts: 'multipart' }
  ? { readonly body: FormData }
  : Optional<'body', BodyInputOf<R>>;

/** What a call to a route takes: its parameters, query and body as the contract types them. */
export type CallOptions<N extends RouteName> = Optional<'params', ParamsOf<ApiRoutes[N]>> & {
  readonly query?: QueryInputOf<ApiRoutes[N]>;
  /** Version that was read, for edits. */
  readonly version?: number;
  readonly idempotencyKey?: string;
  readonly signal?: AbortSignal;
} & BodyOfCall<ApiRoutes[N]>;

interface LooseOptions {
  readonly params?: Readonly<Record<string, unknown>>;
  readonly query?: Readonly<Record<string, unknown>>;
  readonly body?: unknown;
  readonly version?: number;
  readonly idempotencyKey?: string;
  readonly signal?: AbortSignal;
}

interface SessionLink {
  readonly csrfToken: () => string;
  readonly onSignedOut: () => void;
}
let session: SessionLink = { csrfToken: () => '', onSignedOut: () => undefined };

/** Tells the calls where the token of the session is, and whom to tell that it has ended. */
export function connectSession(link: SessionLink): void {
  session = link;
}

/** Address of a route with its parameters and query filled in. */
export function addressOf<N extends RouteName>(name: N, options: Pick<LooseOptions, 'params' | 'query'> = {}): string {
  const path = apiRoutes[name].path.replace(/:(\w+)/g, (_match, key: string) =>
    encodeURIComponent(String(options.params?.[key] ?? '')),
  );
  const query = new URLSearchParams();
  for (const [key, value] of Object.entries(options.query ?? {})) {
    if (value === undefined || value === null || value === '') continue;
    query.set(key, Array.isArray(value) ? value.join(',') : String(value));
  }
  const text = query.toString();
  return `${apiPrefix}${path}${text === '' ? '' : `?${text}`}`;
}

function headersOf(definition: RouteDefinition, options: LooseOptions): Record<string, string> {
  return {
    accept: 'application/json',
    ...(definition.method === 'get' ? {} : { 'x-csrf-token': session.csrfToken() }),
    ...(options.body === undefined || options.body instanceof FormData ? {} : { 'content-type': 'application/json' }),
    ...(options.version === undefined ? {} : { 'if-match': `"${options.version}"` }),
    ...(options.idempotencyKey === undefined ? {} : { 'idempotency-key': options.idempotencyKey }),
  };
}

async function problemOf(response: Response): Promise<ApiProblem> {
  const parsed = problemSchema.safeParse(await response.json().catch(() => null));
  if (parsed.success) return new ApiProblem(parsed.data);
  return localProblem(
    'internal',
    'The service failed',
    `It answered ${response.status}. Nothing was changed; try again.`,
  );
}

async function send(definition: RouteDefinition, address: string, options: LooseOptions): Promise<Response> {
  try {
    return await fetch(address, {
      method: definition.method.toUpperCase(),
      headers: headersOf(definition, options),
      credentials: 'same-origin',
      ...(options.body === undefined
        ? {}
        : { body: options.body instanceof FormData ? options.body : JSON.stringify(options.body) }),
      ...(options.signal === undefined ? {} : { signal: options.signal }),
    });
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    throw localProblem(
      'upstream-failed',
      'No connection',
      'The service cannot be reached. What you entered is still here; try again when you are connected.',
    );
  }
}

/** Calls a route of the contract; what comes back has been parsed by its schema. Throws ApiProblem. */
export async function call<N extends RouteName>(
  name: N,
  ...[options]: Record<string, never> extends CallOptions<N> ? [CallOptions<N>?] : [CallOptions<N>]
): Promise<ResponseOf<ApiRoutes[N]>> {
  const definition: RouteDefinition = apiRoutes[name];
  // The typed options are these keys; their types hang on the name, which the rest does not need.
  const loose = (options ?? {}) as LooseOptions;
  const response = await send(definition, addressOf(name, loose), loose);
  if (!response.ok) {
    const problem = await problemOf(response);
    if (problem.problem.code === 'not-signed-in') session.onSignedOut();
    throw problem;
  }
  const schema: z.ZodType | null = definition.response;
  const answered: unknown = schema === null ? null : schema.parse(await response.json());
  // The schema is the one of this route, which the generic cannot follow.
  return answered as ResponseOf<ApiRoutes[N]>;
}
