import { createHash, randomBytes } from 'node:crypto';
import type { Request } from 'express';
import { Strategy, type TokenCallback, type TokenClient } from 'passport-openidconnect';
import type { Provider } from './provider.ts';

interface Settings {
  readonly clientId: string;
  readonly clientSecret: string;
  readonly callbackUrl: string;
}
type SignIn = (idToken: string) => Promise<Express.User>;

/**
 * OpenID Connect code flow with PKCE and a verified ID token.
 *
 * The library checks state, nonce, issuer, audience and expiry of the claims but neither the token's signature nor PKCE,
 * so both are added here, around the token request: the verifier goes out with the code, and nothing of the answer is
 * used before its signature stands against the provider's published keys.
 */
export class VerifiedStrategy extends Strategy {
  // Not #private: Passport works on Object.create(strategy), which has no such fields.
  private readonly provider: Provider;

  constructor(provider: Provider, settings: Settings, signIn: SignIn) {
    super(
      {
        issuer: provider.issuer,
        authorizationURL: provider.authorizationUrl,
        tokenURL: provider.tokenUrl,
        clientID: settings.clientId,
        clientSecret: settings.clientSecret,
        callbackURL: settings.callbackUrl,
        scope: ['profile', 'email'],
        nonce: true,
        sessionKey: 'openidconnect',
        skipUserProfile: true,
      },
      (_issuer, _profile, _context, idToken, verified) => {
        signIn(idToken).then(
          (user) => verified(null, user),
          (error: unknown) => verified(error),
        );
      },
    );
    this.provider = provider;
  }

  override authenticate(request: Request, options: object = {}): void {
    if (typeof request.query['code'] !== 'string') {
      const verifier = randomBytes(48).toString('base64url');
      request.session.pkceVerifier = verifier;
      const challenge = createHash('sha256').update(verifier).digest('base64url');
      super.authenticate(request, { ...options, challenge });
      return;
    }
    const verifier = request.session.pkceVerifier;
    delete request.session.pkceVerifier;
    // Passport makes a fresh object for each request, so this replaces the client for this request only.
    this._oauth2 = this.verifyingClient(this._oauth2, verifier ?? '');
    super.authenticate(request, options);
  }

  override authorizationParams(options: { challenge?: string }): Record<string, string> {
    return options.challenge === undefined ? {} : { code_challenge: options.challenge, code_challenge_method: 'S256' };
  }

  private verifyingClient(client: TokenClient, verifier: string): TokenClient {
    // Inherits from the library's client, whose other settings the library reads too.
    const verifying: TokenClient = Object.create(client);
    verifying.getOAuthAccessToken = (code: string, parameters: Record<string, string>, done: TokenCallback): void => {
      client.getOAuthAccessToken(code, { ...parameters, code_verifier: verifier }, (error, access, refresh, answer) => {
        if (error) return done(error);
        this.provider.verifyIdToken(answer?.id_token ?? '').then(
          () => done(null, access, refresh, answer),
          (refused: unknown) => done(refused),
        );
      });
    };
    return verifying;
  }
}
