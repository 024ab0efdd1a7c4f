import connectPgSimple from 'connect-pg-simple';
import type { RequestHandler } from 'express';
import session from 'express-session';
import type { Pool } from 'pg';
import type { Config } from '#server/platform/config.ts';

/** The cookie name carries the host prefix only over TLS, where browsers accept it. */
export function isSecure(config: Config): boolean {
  return config.STILLSPAN_PUBLIC_URL.startsWith('https:');
}

/** Sign-in sessions in PostgreSQL; the cookie is renewed with each request until the idle time has passed. */
export function sessionMiddleware(config: Config, pool: Pool): RequestHandler {
  const Store = connectPgSimple(session);
  const secure = isSecure(config);
  return session({
    name: secure ? '__Host-stillspan' : 'stillspan',
    secret: config.STILLSPAN_SESSION_SECRET,
    store: new Store({ pool, tableName: 'sign_in_sessions', pruneSessionInterval: 15 * 60 }),
    resave: false,
    saveUninitialized: false,
    rolling: true,
    cookie: {
      httpOnly: true,
      // The provider sends the person back by a top-level GET, which lax lets through.
      sameSite: 'lax',
      secure,
      path: '/',
      maxAge: config.STILLSPAN_SESSION_IDLE_MINUTES * 60_000,
    },
  });
}

/** Ends sessions that are older than the absolute limit, however busy they are. */
export function absoluteTimeout(config: Config): RequestHandler {
  const limitMs = config.STILLSPAN_SESSION_ABSOLUTE_HOURS * 3_600_000;
  return (request, _response, next) => {
    if (request.user === undefined || Date.now() - request.user.signedInAtMs < limitMs) return next();
    request.logout((error: unknown) => next(error));
  };
}
