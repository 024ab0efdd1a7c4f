import { z } from 'zod';
import { createFakeProvider } from './provider.ts';

const settings = z
  .object({
    STILLSPAN_OIDC_FAKE_PORT: z.coerce.number().int().min(1).max(65535),
    OIDC_ISSUER_URL: z.url(),
    OIDC_CLIENT_ID: z.string().min(1),
    OIDC_CLIENT_SECRET: z.string().min(1),
    STILLSPAN_PUBLIC_URL: z.url(),
    STILLSPAN_OIDC_FAKE_FAULTS: z.enum(['on', 'off']).default('off'),
  })
  .parse(process.env);

const app = await createFakeProvider({
  issuer: settings.OIDC_ISSUER_URL,
  clientId: settings.OIDC_CLIENT_ID,
  clientSecret: settings.OIDC_CLIENT_SECRET,
  applicationUrl: settings.STILLSPAN_PUBLIC_URL,
  takesFaults: settings.STILLSPAN_OIDC_FAKE_FAULTS === 'on',
});
const server = app.listen(settings.STILLSPAN_OIDC_FAKE_PORT, '127.0.0.1', () => process.stdout.write('ready\n'));
for (const signal of ['SIGTERM', 'SIGINT'] as const) {
  process.once(signal, () => {
    server.close();
    server.closeAllConnections();
  });
}
