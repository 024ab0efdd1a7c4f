import { randomBytes } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { z } from 'zod';
import { openDatabase } from '#server/data/database.ts';
import { openAsOwner } from '#server/data/migrate.ts';
import { openFileStore } from '#server/platform/files.ts';
import { Child, waitForPort } from '#scripts/local/child.ts';
import { freePort } from '#scripts/local/ports.ts';
import { projectDirectory } from '#scripts/setup.mjs';
import { loadDemo } from '#worker/demo/load-demo.ts';
import { createTestDatabase, sharedServices, startTestServices } from '../../support/services.ts';

/** The product as it is installed: server, worker and stand-ins as processes of their own, the demo loaded. */
export interface Product {
  readonly url: string;
  readonly mailUrl: string;
  /** Ends the worker as a power cut would, and starts another. */
  restartWorkerAbruptly(): Promise<void>;
  stop(): Promise<void>;
}

async function waitUntilReady(url: string): Promise<void> {
  const until = Date.now() + 60_000;
  while (Date.now() < until) {
    const answer = await fetch(`${url}/health/ready`).catch(() => null);
    if (answer?.ok === true) return;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  throw new Error('the server did not become ready');
}

const tsx = ['--import', 'tsx'];

export async function startProduct(): Promise<Product> {
  const services = sharedServices() ?? (await startTestServices());
  const testDatabase = await createTestDatabase(services);
  const directory = mkdtempSync(join(tmpdir(), 'stillspan-e2e-'));
  const taken = new Set<number>();
  const ports = {
    server: await freePort(19100, taken),
    oidc: await freePort(19200, taken),
    smtp: await freePort(19300, taken),
    mail: await freePort(19400, taken),
    forecast: await freePort(19500, taken),
  };
  const url = `http://127.0.0.1:${ports.server}`;
  const environment = {
    STILLSPAN_PORT: String(ports.server),
    STILLSPAN_PUBLIC_URL: url,
    DATABASE_URL: testDatabase.appUrl,
    // A database number of its own keeps the queues of this product apart from those of other tests.
    REDIS_URL: `${services.redisUrl}/7`,
    STILLSPAN_SESSION_SECRET: randomBytes(24).toString('hex'),
    OIDC_ISSUER_URL: `http://127.0.0.1:${ports.oidc}`,
    OIDC_CLIENT_ID: 'stillspan',
    OIDC_CLIENT_SECRET: 'for-tests-only',
    SMTP_URL: `smtp://127.0.0.1:${ports.smtp}`,
    STILLSPAN_FILES_DIR: join(directory, 'files'),
    STILLSPAN_LOG_LEVEL: 'warn',
    STILLSPAN_OIDC_FAKE_PORT: String(ports.oidc),
  };
  const unexpected = (name: string) => process.stderr.write(`${name} ended during the browser tests\n`);
  const start = (name: string, script: string, flags: string[] = []) =>
    new Child(
      {
        name,
        command: process.execPath,
        arguments: [...tsx, script, ...flags],
        directory: projectDirectory,
        environment,
        logFile: join(directory, `${name}.log`),
      },
      unexpected,
    );
  await loadDemoInto({
    ownerUrl: testDatabase.ownerUrl,
    appUrl: testDatabase.appUrl,
    filesDirectory: environment.STILLSPAN_FILES_DIR,
    issuer: environment.OIDC_ISSUER_URL,
  });
  const children = [
    start('oidc-fake', 'oidc-fake/main.ts'),
    start('stand-ins', 'server/dev/main.ts', [
      `--smtp-port=${ports.smtp}`,
      `--http-port=${ports.mail}`,
      `--forecast-port=${ports.forecast}`,
      `--directory=${join(directory, 'mail')}`,
    ]),
    start('server', 'server/main.ts'),
  ];
  let worker = start('worker', 'worker/main.ts');
  await waitForPort(ports.oidc, { name: 'oidc-fake' });
  await waitUntilReady(url);
  return {
    url,
    mailUrl: `http://127.0.0.1:${ports.mail}`,
    restartWorkerAbruptly: async () => {
      await worker.kill();
      worker = start('worker', 'worker/main.ts');
    },
    stop: async () => {
      await worker.stop();
      for (const child of children.reverse()) await child.stop();
      await testDatabase.drop();
      rmSync(directory, { recursive: true, force: true });
      await services.stop();
    },
  };
}

async function loadDemoInto(place: {
  ownerUrl: string;
  appUrl: string;
  filesDirectory: string;
  issuer: string;
}): Promise<void> {
  const owner = openAsOwner(place.ownerUrl);
  const database = openDatabase(place.appUrl);
  await loadDemo({
    owner,
    database,
    files: openFileStore(place.filesDirectory),
    issuer: place.issuer,
    say: () => undefined,
  });
  await Promise.all([database.close(), owner.destroy()]);
}

const messageSchema = z.object({
  to: z.array(z.string()),
  subject: z.string(),
  text: z.string(),
  messageId: z.string(),
});

/** What the mail sink holds, newest first. */
export async function readMail(product: Pick<Product, 'mailUrl'>): Promise<z.infer<typeof messageSchema>[]> {
  return z.array(messageSchema).parse(await (await fetch(`${product.mailUrl}/messages`)).json());
}
