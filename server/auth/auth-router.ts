import { Router, type NextFunction, type Request, type Response } from 'express';
import type { PassportStatic } from 'passport';
import { guardCsrf } from '#server/http/guards.ts';
import type { Database } from '#server/data/database.ts';
import type { Config } from '#server/platform/config.ts';
import { AppError } from '#server/platform/errors.ts';
import type { Provider } from './provider.ts';
import { signInWith } from './sign-in.ts';
import { VerifiedStrategy } from './verified-strategy.ts';

interface Dependencies {
  readonly config: Config;
  readonly database: Database;
  readonly passport: Pick<PassportStatic, 'authenticate'>;
  readonly findProvider: () => Promise<Provider>;
}

/** Only paths of this site: an absolute address would make the sign-in a trampoline to other sites. */
function localPath(target: unknown): string {
  return typeof target === 'string' && /^\/(?![/\\])[^\s]*$/.test(target) && target.length < 1000 ? target : '/';
}

function refusePlainly(error: unknown, request: Request, response: Response): void {
  request.log.warn({ err: error }, 'sign-in refused');
  const isKnown = error instanceof AppError;
  const reason = isKnown ? error.code : 'refused';
  const detail = isKnown ? error.message : 'The answer of the identity provider was not accepted.';
  request.session.destroy(() => {
    response.redirect(303, `/signed-out?reason=${encodeURIComponent(reason)}&detail=${encodeURIComponent(detail)}`);
  });
}

function finishSignIn(request: Request, response: Response, user: Express.User): void {
  const returnTo = localPath(request.session.returnTo);
  // logIn makes a new session id, so that a session fixed before sign-in is worth nothing.
  request.logIn(user, (error: unknown) => {
    if (error) return refusePlainly(error, request, response);
    request.log.info({ personId: user.personId, utilityId: user.utilityId }, 'signed in');
    response.redirect(303, returnTo);
  });
}

async function signOut(request: Request, response: Response, dependencies: Dependencies): Promise<void> {
  const { config, findProvider } = dependencies;
  const body: unknown = request.body;
  const token: unknown = typeof body === 'object' && body !== null ? Reflect.get(body, 'csrfToken') : undefined;
  if (request.user !== undefined) guardCsrf(request, typeof token === 'string' ? token : undefined);
  const idToken = request.user?.idToken;
  await new Promise<void>((resolve, reject) =>
    request.session.destroy((error: unknown) => (error ? reject(error) : resolve())),
  );
  const home = new URL('/signed-out', config.STILLSPAN_PUBLIC_URL).href;
  const provider = idToken === undefined ? null : await findProvider().catch(() => null);
  if (provider?.endSessionUrl === null || provider === null || idToken === undefined)
    return response.redirect(303, home);
  const end = new URL(provider.endSessionUrl);
  end.searchParams.set('id_token_hint', idToken);
  end.searchParams.set('post_logout_redirect_uri', home);
  response.redirect(303, end.href);
}

/** Sign-in and sign-out: full-page navigations, outside the JSON API. */
export function authRouter(dependencies: Dependencies): Router {
  const { config, database, passport, findProvider } = dependencies;
  const router = Router();
  const settings = {
    clientId: config.OIDC_CLIENT_ID,
    clientSecret: config.OIDC_CLIENT_SECRET,
    callbackUrl: new URL('/auth/callback', config.STILLSPAN_PUBLIC_URL).href,
  };
  const strategyOf = async () => new VerifiedStrategy(await findProvider(), settings, signInWith(database, config));
  const authenticate = async (request: Request, response: Response, next: NextFunction) => {
    const strategy = await strategyOf();
    passport.authenticate(strategy, (error: unknown, user: Express.User | false | null, info: unknown) => {
      if (error || !user) return refusePlainly(error ?? info, request, response);
      finishSignIn(request, response, user);
    })(request, response, next);
  };
  router.get('/sign-in', async (request, response, next) => {
    request.session.returnTo = localPath(request.query['returnTo']);
    await authenticate(request, response, next);
  });
  router.get('/callback', async (request, response, next) => {
    // Without a code or error the strategy would start another sign-in; a bare visit is a mistake.
    if (request.query['code'] === undefined && request.query['error'] === undefined) return response.redirect(303, '/');
    await authenticate(request, response, next);
  });
  router.post('/sign-out', (request, response) => signOut(request, response, dependencies));
  return router;
}
