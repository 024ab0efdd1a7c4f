import { randomUUID } from 'node:crypto';
import { join, resolve } from 'node:path';
import express, { type Express } from 'express';
import { rateLimit } from 'express-rate-limit';
import { Passport } from 'passport';
import type { Pool } from 'pg';
import { pinoHttp } from 'pino-http';
import { apiPrefix } from '#shared/contract/routes.ts';
import { authRouter } from './auth/auth-router.ts';
import { providerSource } from './auth/provider.ts';
import { absoluteTimeout, sessionMiddleware } from './auth/session-middleware.ts';
import type { Deps } from './features/deps.ts';
import { handlersOf } from './features/handlers.ts';
import { apiRouter } from './http/api-router.ts';
import { healthRouter, metrics, type ReadyChecks } from './http/health.ts';
import { bodyErrors, jsonBody } from './http/json-body.ts';
import { problemHandler, unknownPath } from './http/problems.ts';
import { securityHeaders } from './http/security-headers.ts';
import { openApiDocument } from './openapi/document.ts';
import { readingPage } from './openapi/reading-page.ts';
import { AppError } from './platform/errors.ts';

export interface AppDeps extends Deps {
  /** Pool of the sign-in sessions. */
  readonly sessionPool: Pool;
  readonly readyChecks: ReadyChecks;
}

const requestsPerMinute = 1200;

function limited() {
  return rateLimit({
    windowMs: 60_000,
    limit: requestsPerMinute,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    handler: (_request, _response, next) =>
      next(new AppError('too-many-requests', 'Too many requests in a minute. Wait a little.')),
  });
}

function mountApi(app: Express, deps: AppDeps): void {
  const document = JSON.stringify(openApiDocument());
  app.get(`${apiPrefix}/openapi.json`, (_request, response) => {
    response.type('application/json').send(document);
  });
  const page = readingPage();
  app.get(`${apiPrefix}/`, (_request, response) => {
    response.type('html').send(page);
  });
  app.use(apiPrefix, jsonBody, bodyErrors, apiRouter(deps.database, handlersOf(deps)));
  app.use('/api', unknownPath);
}

/** The built client; every path that is not a file is a page of the client's router. */
function mountClient(app: Express, directory: string): void {
  const root = resolve(directory);
  app.use('/assets', express.static(join(root, 'assets'), { immutable: true, maxAge: '365d', fallthrough: false }));
  app.use(express.static(root, { index: false, maxAge: 0 }));
  app.get(/^\/(?!api\/|auth\/|health\/).*/, (_request, response) => {
    response.set('Cache-Control', 'no-cache').sendFile(join(root, 'index.html'));
  });
}

/** What the log keeps of a request: no headers and no query, which may hold credentials. */
function loggedRequest(request: { id: unknown; method: string; url: string }) {
  return { id: request.id, method: request.method, path: request.url.split('?')[0] };
}

/** Builds the HTTP service; it never listens by itself. */
export function createApp(deps: AppDeps): Express {
  const { config, database, logger } = deps;
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', config.STILLSPAN_TRUST_PROXY === 'true' ? 1 : false);
  const { measure, expose } = metrics();
  app.use(
    pinoHttp({
      logger,
      genReqId: () => randomUUID(),
      serializers: { req: loggedRequest },
      autoLogging: { ignore: (request) => request.url?.startsWith('/health') === true },
    }),
  );
  app.use((request, response, next) => {
    response.set('X-Request-Id', String(request.id));
    next();
  });
  app.use(measure, securityHeaders(config));
  app.use('/health', healthRouter(deps.readyChecks, logger));
  app.get('/metrics', expose);
  const passport = new Passport();
  passport.serializeUser<Express.User>((user, done) => done(null, user));
  passport.deserializeUser<Express.User>((user, done) => done(null, user));
  const authenticated = [
    sessionMiddleware(config, deps.sessionPool),
    passport.initialize(),
    passport.session(),
    absoluteTimeout(config),
  ];
  const findProvider = providerSource(config.OIDC_ISSUER_URL, config.OIDC_CLIENT_ID);
  app.use(['/auth', '/api'], limited(), ...authenticated);
  app.use(
    '/auth',
    express.urlencoded({ extended: false, limit: '10kb' }),
    authRouter({ config, database, passport, findProvider }),
  );
  mountApi(app, deps);
  mountClient(app, config.STILLSPAN_CLIENT_DIR);
  app.use(problemHandler);
  return app;
}
