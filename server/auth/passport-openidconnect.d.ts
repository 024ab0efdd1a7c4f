declare module 'passport-openidconnect' {
  import type { Request } from 'express';
  import { Strategy as PassportStrategy } from 'passport';

  interface TokenParameters {
    id_token?: string;
    [key: string]: unknown;
  }
  export type TokenCallback = (
    error: unknown,
    accessToken?: string,
    refreshToken?: string,
    parameters?: TokenParameters,
  ) => void;
  /** The part of the OAuth 2.0 client that a subclass may replace. */
  export interface TokenClient {
    getOAuthAccessToken(code: string, parameters: Record<string, string>, callback: TokenCallback): void;
  }
  interface StrategyOptions {
    issuer: string;
    authorizationURL: string;
    tokenURL: string;
    clientID: string;
    clientSecret: string;
    callbackURL: string;
    scope?: string[];
    nonce: boolean;
    sessionKey: string;
    skipUserProfile: boolean;
  }
  type Verified = (error: unknown, user?: Express.User | false, info?: unknown) => void;
  // The library looks at the arity of this function to decide what it passes.
  type Verify = (issuer: string, profile: unknown, context: unknown, idToken: string, verified: Verified) => void;
  export class Strategy extends PassportStrategy {
    constructor(options: StrategyOptions, verify: Verify);
    protected _oauth2: TokenClient;
    override authenticate(request: Request, options?: object): void;
    authorizationParams(options: object): Record<string, string>;
  }
}
