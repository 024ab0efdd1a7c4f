import { randomBytes } from 'node:crypto';
import { decodeJwt } from 'jose';
import { z } from 'zod';
import { roleSchema, type Role } from '#shared/contract/roles.ts';
import type { Database } from '#server/data/database.ts';
import { savePersonAtSignIn } from '#server/data/people.repository.ts';
import type { Config } from '#server/platform/config.ts';
import { AppError } from '#server/platform/errors.ts';

const nameClaims = z.object({
  iss: z.string(),
  sub: z.string().min(1).max(255),
  name: z.string().min(1).max(200).optional(),
  email: z.email(),
});

/** Roles named in a claim; unknown names are left out, because a provider may serve other programs too. */
function rolesIn(claim: unknown): Role[] {
  const parsed = z.array(z.string()).safeParse(claim);
  if (!parsed.success) return [];
  return parsed.data.flatMap((name) => {
    const role = roleSchema.safeParse(name);
    return role.success ? [role.data] : [];
  });
}

function refused(detail: string): AppError {
  return new AppError('not-allowed', detail);
}

/** Makes a signed-in person of an ID token whose signature has been verified; keeps person and roles in the database. */
export function signInWith(database: Database, config: Config): (idToken: string) => Promise<Express.User> {
  return async (idToken) => {
    const claims = decodeJwt(idToken);
    const named = nameClaims.safeParse(claims);
    if (!named.success) throw refused('The identity provider sent no usable name and e-mail address for this person.');
    const code = z.string().safeParse(claims[config.OIDC_UTILITY_CLAIM]);
    const utilityId = code.success ? await database.utilityIdOfCode(code.data) : null;
    if (utilityId === null) {
      throw refused(`This person belongs to no utility that is known here (claim ${config.OIDC_UTILITY_CLAIM}).`);
    }
    const roles = rolesIn(claims[config.OIDC_ROLES_CLAIM]);
    if (roles.length === 0) {
      throw refused(
        `This person holds no role here (claim ${config.OIDC_ROLES_CLAIM}). Ask the administrator of the utility.`,
      );
    }
    const { sub, email, name = email, iss } = named.data;
    const person = { issuer: iss, subject: sub, displayName: name, email, roles };
    const saved = await database.withUtility({ utilityId, personId: null, requestId: null }, (tx) =>
      savePersonAtSignIn(tx, person),
    );
    return {
      ...saved,
      utilityId,
      displayName: name,
      email,
      roles,
      csrfToken: randomBytes(24).toString('base64url'),
      signedInAtMs: Date.now(),
      idToken,
    };
  };
}
