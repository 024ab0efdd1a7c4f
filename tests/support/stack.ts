import { randomBytes, randomUUID } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import type { Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createTransport } from 'nodemailer';
import pg from 'pg';
import { createApp } from '#server/app.ts';
import { openDatabase, type Database } from '#server/data/database.ts';
import { startMailSink } from '#server/dev/mail-sink.ts';
import { jobPoke } from '#server/jobs/job-poke.ts';
import { progressFeed } from '#server/jobs/progress-feed.ts';
import { loadConfig, type Config } from '#server/platform/config.ts';
import { openFileStore, type FileStore } from '#server/platform/files.ts';
import { openLogger, type Logger } from '#server/platform/logger.ts';
import { openFailFastRedis, openWaitingRedis } from '#server/platform/redis.ts';
import { startWorker, type RunningWorker } from '#worker/start-worker.ts';
import { createFakeProvider } from '../../oidc-fake/provider.ts';
import { freePort } from '#scripts/local/ports.ts';
import { createTestDatabase, sharedServices, startTestServices, type TestDatabase } from './services.ts';

/** Everything but the browser, for real: database, Redis, identity provider, mail server, HTTP service and worker. */
export interface Stack {
  readonly config: Config;
  readonly database: Database;
  readonly testDatabase: TestDatabase;
  readonly files: FileStore;
  readonly logger: Logger;
  readonly url: string;
  readonly issuerUrl: string;
  readonly mailUrl: string;
  readonly redisUrl: string;
  readonly queuePrefix: string;
  /** Starts a worker in this process. */
  startWorker(): RunningWorker;
  stop(): Promise<void>;
}

function listen(
  server: { listen(port: number, host: string, ready: () => void): Server },
  port: number,
): Promise<Server> {
  return new Promise((resolve) => {
    const listening = server.listen(port, '127.0.0.1', () => resolve(listening));
  });
}

function configFor(place: {
  testDatabase: TestDatabase;
  redisUrl: string;
  port: number;
  oidcPort: number;
  smtpPort: number;
  directory: string;
}): Config {
  return loadConfig({
    STILLSPAN_PORT: String(place.port),
    STILLSPAN_PUBLIC_URL: `http://127.0.0.1:${place.port}`,
    DATABASE_URL: place.testDatabase.appUrl,
    REDIS_URL: place.redisUrl,
    STILLSPAN_SESSION_SECRET: randomBytes(24).toString('hex'),
    OIDC_ISSUER_URL: `http://127.0.0.1:${place.oidcPort}`,
    OIDC_CLIENT_ID: 'stillspan',
    OIDC_CLIENT_SECRET: 'for-tests-only',
    SMTP_URL: `smtp://127.0.0.1:${place.smtpPort}`,
    STILLSPAN_FILES_DIR: join(place.directory, 'files'),
    STILLSPAN_LOG_LEVEL: process.env['TEST_LOG_LEVEL'] ?? 'silent',
  });
}

async function startProvider(config: Config, port: number): Promise<Server> {
  const app = await createFakeProvider({
    issuer: config.OIDC_ISSUER_URL,
    clientId: config.OIDC_CLIENT_ID,
    clientSecret: config.OIDC_CLIENT_SECRET,
    applicationUrl: config.STILLSPAN_PUBLIC_URL,
    takesFaults: true,
  });
  return listen(app, port);
}

function openParts(config: Config) {
  const logger = openLogger(config, 'server');
  const database = openDatabase(config.DATABASE_URL);
  const files = openFileStore(config.STILLSPAN_FILES_DIR);
  const sessionPool = new pg.Pool({ connectionString: config.DATABASE_URL, max: 3 });
  const publisher = openFailFastRedis(config.REDIS_URL);
  const subscriber = openWaitingRedis(config.REDIS_URL);
  const app = createApp({
    config,
    logger,
    database,
    sessionPool,
    files,
    jobs: jobPoke(publisher, logger),
    progress: progressFeed(subscriber),
    readyChecks: { database: database.ping, redis: () => publisher.ping() },
  });
  const close = async () => {
    publisher.disconnect();
    subscriber.disconnect();
    await Promise.allSettled([sessionPool.end(), database.close()]);
  };
  return { logger, database, files, app, close };
}

async function stopServer(server: Server): Promise<void> {
  server.closeAllConnections();
  await new Promise<void>((resolve) => server.close(() => resolve()));
}

/** Starts a stack with a database of its own. Two utilities, tern and skua, are there; nothing else. */
export async function startStack(): Promise<Stack> {
  const services = sharedServices() ?? (await startTestServices());
  const testDatabase = await createTestDatabase(services);
  const directory = mkdtempSync(join(tmpdir(), 'stillspan-stack-'));
  const taken = new Set<number>();
  const [port, oidcPort, smtpPort, mailPort] = [
    await freePort(18100, taken),
    await freePort(18200, taken),
    await freePort(18300, taken),
    await freePort(18400, taken),
  ];
  const config = configFor({ testDatabase, redisUrl: services.redisUrl, port, oidcPort, smtpPort, directory });
  const provider = await startProvider(config, oidcPort);
  const sink = await startMailSink({ smtpPort, httpPort: mailPort, directory: join(directory, 'mail') });
  const parts = openParts(config);
  const server = await listen(parts.app, port);
  const mailer = createTransport(config.SMTP_URL);
  const queuePrefix = `test-${randomUUID()}`;
  const workers: RunningWorker[] = [];
  await makeUtilities(testDatabase);
  return {
    config,
    testDatabase,
    database: parts.database,
    files: parts.files,
    logger: parts.logger,
    url: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    issuerUrl: config.OIDC_ISSUER_URL,
    mailUrl: `http://127.0.0.1:${mailPort}`,
    redisUrl: services.redisUrl,
    queuePrefix,
    startWorker: () => {
      const worker = startWorker({ ...parts, config, mailer }, services.redisUrl, queuePrefix);
      workers.push(worker);
      return worker;
    },
    stop: async () => {
      for (const worker of workers) await worker.stop();
      mailer.close();
      for (const each of [server, provider]) await stopServer(each);
      await sink.stop();
      await parts.close();
      await testDatabase.drop();
      rmSync(directory, { recursive: true, force: true });
      await services.stop();
    },
  };
}

export const ternId = '00000000-0000-4000-8000-00000000000a';
export const skuaId = '00000000-0000-4000-8000-00000000000b';

async function makeUtilities(testDatabase: TestDatabase): Promise<void> {
  const client = new pg.Client({ connectionString: testDatabase.ownerUrl });
  await client.connect();
  await client.query(
    `insert into utilities (id, code, name, currency_code, default_roughness_m)
     values ($1, 'tern', 'Tern Island Power', 'EUR', 0.05), ($2, 'skua', 'Skua Rock Electric', 'EUR', 0.05)`,
    [ternId, skuaId],
  );
  await client.end();
}
