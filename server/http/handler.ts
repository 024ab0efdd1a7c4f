import type { Request } from 'express';
import type { BodyOf, ParamsOf, QueryOf, ResponseOf } from '#shared/contract/route.ts';
import type { ApiRoutes, RouteName } from '#shared/contract/routes.ts';
import type { Actor } from '#server/data/database.ts';

/** A request after the edge: who acts, and every part as its schema parsed it. */
export interface Call<N extends RouteName> {
  readonly actor: Actor;
  readonly person: Express.User;
  readonly params: ParamsOf<ApiRoutes[N]>;
  readonly query: QueryOf<ApiRoutes[N]>;
  readonly body: BodyOf<ApiRoutes[N]>;
  /** Version from If-Match on routes that need it, else null. */
  readonly version: number | null;
  readonly request: Request;
}

type JsonHandler<N extends RouteName> = {
  readonly kind: 'json';
  run(call: Call<N>): Promise<ResponseOf<ApiRoutes[N]>>;
};
type EventsHandler<N extends RouteName> = {
  readonly kind: 'events';
  open(call: Call<N>): Promise<(signal: AbortSignal) => AsyncIterable<ResponseOf<ApiRoutes[N]>>>;
};
type FileHandler<N extends RouteName> = {
  readonly kind: 'file';
  read(call: Call<N>): Promise<{ mediaType: string; content: Buffer }>;
};
export type HandlerOf<N extends RouteName> = ApiRoutes[N] extends { answers: 'events' }
  ? EventsHandler<N>
  : ApiRoutes[N] extends { answers: 'file' }
    ? FileHandler<N>
    : JsonHandler<N>;
export type Handlers = { readonly [N in RouteName]: HandlerOf<N> };

/** The same with the types of one route forgotten: parameters are method-bivariant, their schemas have parsed them. */
export type AnyHandler =
  | { readonly kind: 'json'; run(call: unknown): Promise<unknown> }
  | { readonly kind: 'events'; open(call: unknown): Promise<(signal: AbortSignal) => AsyncIterable<unknown>> }
  | { readonly kind: 'file'; read(call: unknown): Promise<{ mediaType: string; content: Buffer }> };

type RunOf<N extends RouteName> = (call: Call<N>) => Promise<ResponseOf<ApiRoutes[N]>>;
/** Wraps a plain function as the handler of a JSON route. */
export function json<N extends RouteName>(
  run: RunOf<N>,
): { readonly kind: 'json'; run(call: Call<N>): Promise<ResponseOf<ApiRoutes[N]>> } {
  return { kind: 'json', run };
}
