import 'pino-http';
import { Router, type Request, type Response } from 'express';
import type { RouteDefinition } from '#shared/contract/route.ts';
import { apiRoutes, type RouteName } from '#shared/contract/routes.ts';
import type { Actor, Database } from '#server/data/database.ts';
import { sendEvents } from './events.ts';
import { guardAccess, guardCsrf, signedIn, versionOf } from './guards.ts';
import type { AnyHandler, Handlers } from './handler.ts';
import { onceByKey } from './idempotency.ts';
import { parsePart } from './parse.ts';

function actorOf(request: Request): Actor {
  const person = signedIn(request);
  return { utilityId: person.utilityId, personId: person.personId, requestId: String(request.id) };
}

function etagOf(body: unknown): string | null {
  const version: unknown = typeof body === 'object' && body !== null ? Reflect.get(body, 'versionNumber') : undefined;
  return typeof version === 'number' ? `"${version}"` : null;
}

interface Mounted {
  readonly name: RouteName;
  readonly definition: RouteDefinition;
  readonly handler: AnyHandler;
  readonly database: Database;
}

async function answer(mounted: Mounted, request: Request, response: Response): Promise<void> {
  const { definition, handler, database, name } = mounted;
  guardAccess(definition, request);
  if (definition.method !== 'get') guardCsrf(request, request.get('X-CSRF-Token'));
  const call = {
    actor: actorOf(request),
    person: signedIn(request),
    params: parsePart(definition, 'params', request.params),
    query: parsePart(definition, 'query', request.query),
    body: definition.accepts === 'multipart' ? undefined : parsePart(definition, 'body', request.body),
    version: versionOf(definition, request),
    request,
  };
  if (handler.kind === 'events') {
    const source = await handler.open(call);
    return sendEvents(request, response, source);
  }
  if (handler.kind === 'file') {
    const file = await handler.read(call);
    response
      .set('Content-Disposition', 'inline')
      .set('Cache-Control', 'private, max-age=3600')
      .type(file.mediaType)
      .send(file.content);
    return;
  }
  const run = async () => ({ status: definition.status, body: await handler.run(call) });
  const context = { actor: call.actor, request, routeName: name, input: { params: call.params, body: call.body } };
  const result = definition.isIdempotent === true ? await onceByKey(database, context, run) : await run();
  const etag = etagOf(result.body);
  if (etag !== null) response.set('ETag', etag);
  response.set('Cache-Control', 'no-store').status(result.status);
  if (definition.response === null) response.end();
  else response.json(result.body);
}

/** Mounts every route of the contract; a route without a handler does not compile. */
export function apiRouter(database: Database, handlers: Handlers): Router {
  const router = Router();
  for (const name of Object.keys(apiRoutes) as RouteName[]) {
    const definition: RouteDefinition = apiRoutes[name];
    const handler: AnyHandler = handlers[name];
    router[definition.method](definition.path, (request, response) =>
      answer({ name, definition, handler, database }, request, response),
    );
  }
  return router;
}
