import helmet from 'helmet';
import type { RequestHandler } from 'express';
import type { Config } from '#server/platform/config.ts';

/** Content security policy and its kin; the tile server and the provider's sign-out are let in by name. */
export function securityHeaders(config: Config): RequestHandler {
  const secure = config.STILLSPAN_PUBLIC_URL.startsWith('https:');
  const tiles =
    config.STILLSPAN_TILE_URL === undefined ? [] : [new URL(config.STILLSPAN_TILE_URL.replace(/\{\w\}/g, 'a')).origin];
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: [`'self'`],
        scriptSrc: [`'self'`],
        // Quasar and Leaflet place things by style attributes; no style sheet from elsewhere is let in.
        styleSrc: [`'self'`, `'unsafe-inline'`],
        imgSrc: [`'self'`, 'data:', 'blob:', ...tiles],
        fontSrc: [`'self'`],
        connectSrc: [`'self'`],
        workerSrc: [`'self'`, 'blob:'],
        manifestSrc: [`'self'`],
        objectSrc: [`'none'`],
        baseUri: [`'self'`],
        frameAncestors: [`'none'`],
        // Sign-out posts here and is redirected to the provider, which browsers check against this list.
        formAction: [`'self'`, new URL(config.OIDC_ISSUER_URL).origin],
        ...(secure ? { upgradeInsecureRequests: [] } : {}),
      },
    },
    strictTransportSecurity: secure ? { maxAge: 31_536_000, includeSubDomains: false } : false,
    crossOriginEmbedderPolicy: false,
    referrerPolicy: { policy: 'same-origin' },
  });
}
