import { createServer } from 'node:http';
import pg from 'pg';
import { createApp } from './app.ts';
import { openDatabase } from './data/database.ts';
import { jobPoke } from './jobs/job-poke.ts';
import { progressFeed } from './jobs/progress-feed.ts';
import { loadConfigOrExit } from './platform/config.ts';
import { openFileStore } from './platform/files.ts';
import { openLogger } from './platform/logger.ts';
import { openFailFastRedis, openWaitingRedis } from './platform/redis.ts';

const config = loadConfigOrExit();
const logger = openLogger(config, 'server');
const database = openDatabase(config.DATABASE_URL);
const sessionPool = new pg.Pool({ connectionString: config.DATABASE_URL, max: 5 });
sessionPool.on('error', (error) => logger.warn({ err: error }, 'session connection lost'));
const publisher = openFailFastRedis(config.REDIS_URL);
const subscriber = openWaitingRedis(config.REDIS_URL);
for (const redis of [publisher, subscriber])
  redis.on('error', (error) => logger.warn({ err: error }, 'Redis connection'));

const app = createApp({
  config,
  logger,
  database,
  sessionPool,
  files: openFileStore(config.STILLSPAN_FILES_DIR),
  jobs: jobPoke(publisher, logger),
  progress: progressFeed(subscriber),
  readyChecks: { database: database.ping, redis: () => publisher.ping() },
});
const server = createServer(app);
server.listen(config.STILLSPAN_PORT, config.STILLSPAN_HOST, () =>
  logger.info({ port: config.STILLSPAN_PORT }, 'listening'),
);
server.on('error', (error) => {
  logger.fatal({ err: error }, `cannot listen on ${config.STILLSPAN_HOST}:${config.STILLSPAN_PORT} (STILLSPAN_PORT)`);
  process.exit(1);
});

const graceMs = 5000;
async function shutDown(): Promise<void> {
  logger.info('shutting down');
  server.close();
  // Event streams stay open for as long as a page is; they are cut so that the process can end.
  setTimeout(() => server.closeAllConnections(), graceMs / 10).unref();
  await Promise.allSettled([database.close(), sessionPool.end()]);
  publisher.disconnect();
  subscriber.disconnect();
}
for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, () => void shutDown());
