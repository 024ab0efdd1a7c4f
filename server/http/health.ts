import { Router } from 'express';
import { collectDefaultMetrics, Histogram, Registry } from 'prom-client';
import type { RequestHandler } from 'express';
import type { Logger } from '#server/platform/logger.ts';

/** A check that resolves when what it names can be used. */
export type ReadyChecks = Readonly<Record<string, () => Promise<unknown>>>;

/** Liveness: the process answers. Readiness: what it needs answers too. */
export function healthRouter(checks: ReadyChecks, logger: Logger): Router {
  const router = Router();
  router.get('/live', (_request, response) => {
    response.json({ status: 'live' });
  });
  router.get('/ready', async (_request, response) => {
    const results = await Promise.all(
      Object.entries(checks).map(async ([name, check]) => {
        try {
          await check();
          return [name, 'ready'] as const;
        } catch (error) {
          logger.warn({ err: error, check: name }, 'not ready');
          return [name, 'not ready'] as const;
        }
      }),
    );
    const isReady = results.every(([, state]) => state === 'ready');
    response
      .status(isReady ? 200 : 503)
      .json({ status: isReady ? 'ready' : 'not ready', checks: Object.fromEntries(results) });
  });
  return router;
}

/** Request durations by route and status, and the figures of the process, as Prometheus text. */
export function metrics(): { measure: RequestHandler; expose: RequestHandler } {
  const registry = new Registry();
  collectDefaultMetrics({ register: registry, prefix: 'stillspan_' });
  const durations = new Histogram({
    name: 'stillspan_http_request_duration_seconds',
    help: 'Time to answer a request',
    labelNames: ['method', 'route', 'status'],
    buckets: [0.01, 0.03, 0.1, 0.3, 1, 3, 10],
    registers: [registry],
  });
  return {
    measure: (request, response, next) => {
      const stop = durations.startTimer();
      response.on('finish', () => {
        const route: unknown = request.route === undefined ? undefined : Reflect.get(request.route, 'path');
        stop({
          method: request.method,
          route: typeof route === 'string' ? route : 'other',
          status: response.statusCode,
        });
      });
      next();
    },
    expose: async (_request, response) => {
      response.type(registry.contentType).send(await registry.metrics());
    },
  };
}
