import { createRemoteJWKSet, jwtVerify, type JWTPayload } from 'jose';
import { z } from 'zod';
import { AppError } from '#server/platform/errors.ts';

const discoverySchema = z.object({
  issuer: z.string(),
  authorization_endpoint: z.url(),
  token_endpoint: z.url(),
  jwks_uri: z.url(),
  end_session_endpoint: z.url().optional(),
});

/** The identity provider as its discovery document describes it. */
export interface Provider {
  readonly issuer: string;
  readonly authorizationUrl: string;
  readonly tokenUrl: string;
  readonly endSessionUrl: string | null;
  /** Checks signature, issuer, audience and expiry of an ID token against the keys the provider publishes. */
  verifyIdToken(idToken: string): Promise<JWTPayload>;
}

const clockToleranceSeconds = 10;

async function discover(issuerUrl: string, clientId: string): Promise<Provider> {
  const address = `${issuerUrl.replace(/\/$/, '')}/.well-known/openid-configuration`;
  const response = await fetch(address, { signal: AbortSignal.timeout(10_000) });
  if (!response.ok) throw new Error(`discovery answered ${response.status}`);
  const found = discoverySchema.parse(await response.json());
  if (found.issuer !== issuerUrl) throw new Error(`discovery names the issuer ${found.issuer}, expected ${issuerUrl}`);
  const keys = createRemoteJWKSet(new URL(found.jwks_uri));
  return {
    issuer: found.issuer,
    authorizationUrl: found.authorization_endpoint,
    tokenUrl: found.token_endpoint,
    endSessionUrl: found.end_session_endpoint ?? null,
    verifyIdToken: async (idToken) => {
      const options = { issuer: found.issuer, audience: clientId, clockTolerance: clockToleranceSeconds };
      const { payload } = await jwtVerify(idToken, keys, {
        ...options,
        requiredClaims: ['sub', 'exp', 'iat', 'nonce'],
      });
      return payload;
    },
  };
}

/** Finds the provider at first use and keeps it; a failure is not kept, so that the next sign-in tries again. */
export function providerSource(issuerUrl: string, clientId: string): () => Promise<Provider> {
  let found: Promise<Provider> | null = null;
  return async () => {
    found ??= discover(issuerUrl, clientId);
    try {
      return await found;
    } catch (error) {
      found = null;
      throw new AppError('upstream-failed', 'The identity provider does not answer. Try again in a minute.', {
        cause: error,
      });
    }
  };
}
