import 'express-session';
import type { Role } from '#shared/contract/roles.ts';

/** What a sign-in session keeps of a person; roles are those the identity provider stated at sign-in. */
export interface SignedInPerson {
  readonly personId: string;
  readonly utilityId: string;
  readonly utilityCode: string;
  readonly utilityName: string;
  readonly currencyCode: string;
  readonly displayName: string;
  readonly email: string;
  readonly roles: readonly Role[];
  readonly csrfToken: string;
  readonly signedInAtMs: number;
  readonly idToken: string;
}

declare module 'express-session' {
  interface SessionData {
    pkceVerifier: string;
    returnTo: string;
  }
}

declare global {
  // eslint's rule against namespaces does not reach declaration merging with Express.
  namespace Express {
    interface User extends SignedInPerson {
      readonly personId: string;
    }
  }
}
