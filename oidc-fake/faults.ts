import { decodeJwt, decodeProtectedHeader, generateKeyPair, SignJWT, type CryptoKey, type JWTPayload } from 'jose';

/** Ways in which the next token answer can be wrong. */
export const faults = ['forged-signature', 'wrong-audience', 'wrong-nonce', 'wrong-issuer', 'expired'] as const;
export type Fault = (typeof faults)[number];

const longAgoSeconds = 86_400;

function spoiled(claims: JWTPayload, fault: Fault): JWTPayload {
  const { exp = 0, iat = 0 } = claims;
  switch (fault) {
    case 'forged-signature':
      return { ...claims, stillspan_roles: ['admin', 'engineer'] };
    case 'wrong-audience':
      return { ...claims, aud: 'another-program' };
    case 'wrong-nonce':
      return { ...claims, nonce: 'another-nonce' };
    case 'wrong-issuer':
      return { ...claims, iss: 'http://127.0.0.1:1/another-issuer' };
    case 'expired':
      return { ...claims, iat: iat - longAgoSeconds, exp: exp - longAgoSeconds };
  }
}

/** Spoils an ID token: the forged one is signed by a key that is not the provider's, the others by its own. */
export async function spoilIdToken(idToken: string, fault: Fault, providerKey: CryptoKey): Promise<string> {
  const { kid = '' } = decodeProtectedHeader(idToken);
  const forgedKey = (await generateKeyPair('RS256')).privateKey;
  return new SignJWT(spoiled(decodeJwt(idToken), fault))
    .setProtectedHeader({ alg: 'RS256', kid })
    .sign(fault === 'forged-signature' ? forgedKey : providerKey);
}
