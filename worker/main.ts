import { createTransport } from 'nodemailer';
import { openDatabase } from '#server/data/database.ts';
import { loadConfigOrExit } from '#server/platform/config.ts';
import { openFileStore } from '#server/platform/files.ts';
import { openLogger } from '#server/platform/logger.ts';
import { startWorker } from './start-worker.ts';

const config = loadConfigOrExit();
const logger = openLogger(config, 'worker');
const database = openDatabase(config.DATABASE_URL);
const mailer = createTransport(config.SMTP_URL);
const files = openFileStore(config.STILLSPAN_FILES_DIR);
const worker = startWorker({ config, database, files, logger, mailer }, config.REDIS_URL);
logger.info({ concurrency: config.STILLSPAN_WORKER_CONCURRENCY }, 'worker started');

async function shutDown(): Promise<void> {
  logger.info('finishing what runs, then stopping');
  await worker.stop();
  mailer.close();
  await database.close();
}
for (const signal of ['SIGTERM', 'SIGINT'] as const) process.once(signal, () => void shutDown());
