import { randomBytes } from 'node:crypto';
import express, { type Express } from 'express';
import { exportJWK, generateKeyPair } from 'jose';
import { Provider } from 'oidc-provider';
import { z } from 'zod';
import { faults, spoilIdToken, type Fault } from './faults.ts';
import { choicePage, signedOutPage, signOutPage } from './pages.ts';
import { demoPeople } from './people.ts';

export interface FakeSettings {
  readonly issuer: string;
  readonly clientId: string;
  readonly clientSecret: string;
  /** Address of Stillspan; sign-in and sign-out come back to it. */
  readonly applicationUrl: string;
  /** Lets tests make the next token answer wrong. */
  readonly takesFaults: boolean;
}

const claimNames = ['sub', 'name', 'email', 'stillspan_utility', 'stillspan_roles'];

function claimsOf(sub: string) {
  const person = demoPeople.find((candidate) => candidate.sub === sub);
  return {
    sub,
    name: person?.name ?? sub,
    email: person?.email ?? '',
    stillspan_utility: person?.utility ?? '',
    stillspan_roles: [...(person?.roles ?? [])],
  };
}

async function makeProvider(settings: FakeSettings) {
  const { privateKey } = await generateKeyPair('RS256', { extractable: true });
  const key = { ...(await exportJWK(privateKey)), kid: randomBytes(8).toString('hex'), alg: 'RS256', use: 'sig' };
  const home = (path: string) => new URL(path, settings.applicationUrl).href;
  const provider = new Provider(settings.issuer, {
    clients: [
      {
        client_id: settings.clientId,
        client_secret: settings.clientSecret,
        redirect_uris: [home('/auth/callback')],
        post_logout_redirect_uris: [home('/signed-out')],
        grant_types: ['authorization_code'],
        response_types: ['code'],
        token_endpoint_auth_method: 'client_secret_post',
      },
    ],
    jwks: { keys: [key] },
    cookies: { keys: [randomBytes(24).toString('hex')] },
    // Without this the roles are only at the userinfo endpoint, which Stillspan does not ask.
    conformIdTokenClaims: false,
    claims: { openid: claimNames, profile: [], email: [] },
    pkce: { required: () => true },
    findAccount: (_context, sub) => ({ accountId: sub, claims: () => claimsOf(sub) }),
    interactions: { url: (_context, interaction) => `/interaction/${interaction.uid}` },
    loadExistingGrant: async (context) => {
      const { client, session, provider: own } = context.oidc;
      const grant = new own.Grant({ clientId: client?.clientId ?? '', accountId: session?.accountId ?? '' });
      grant.addOIDCScope('openid profile email');
      await grant.save();
      return grant;
    },
    ttl: { Session: 12 * 3600, Interaction: 3600, Grant: 12 * 3600, AccessToken: 600, IdToken: 600 },
    features: {
      devInteractions: { enabled: false },
      rpInitiatedLogout: {
        enabled: true,
        logoutSource: (context, form) => {
          context.body = signOutPage(form);
        },
        postLogoutSuccessSource: (context) => {
          context.body = signedOutPage();
        },
      },
    },
  });
  return { provider, privateKey };
}

const faultRequest = z.object({ next: z.enum([...faults, 'none']) });
const tokenAnswer = z.looseObject({ id_token: z.string() });

/** Builds the stand-in provider: people to click, and on request wrong tokens. */
export async function createFakeProvider(settings: FakeSettings): Promise<Express> {
  const { provider, privateKey } = await makeProvider(settings);
  let nextFault: Fault | null = null;
  provider.use(async (context, next) => {
    await next();
    const answer = tokenAnswer.safeParse(context.body);
    if (context.path !== '/token' || nextFault === null || !answer.success) return;
    const fault = nextFault;
    nextFault = null;
    context.body = { ...answer.data, id_token: await spoilIdToken(answer.data.id_token, fault, privateKey) };
  });
  const app = express();
  app.get('/interaction/:uid', (request, response) => {
    response.send(choicePage(request.params.uid, demoPeople));
  });
  app.post('/interaction/:uid/person', express.urlencoded({ extended: false }), async (request, response) => {
    const { sub } = z.object({ sub: z.enum(demoPeople.map((person) => person.sub)) }).parse(request.body);
    await provider.interactionFinished(
      request,
      response,
      { login: { accountId: sub } },
      { mergeWithLastSubmission: false },
    );
  });
  if (settings.takesFaults) {
    app.post('/faults', express.json(), (request, response) => {
      const { next } = faultRequest.parse(request.body);
      nextFault = next === 'none' ? null : next;
      response.status(204).end();
    });
  }
  app.use(provider.callback());
  return app;
}
