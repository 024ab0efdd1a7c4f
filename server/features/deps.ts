import type { Database } from '#server/data/database.ts';
import type { JobPoke } from '#server/jobs/job-poke.ts';
import type { ProgressFeed } from '#server/jobs/progress-feed.ts';
import type { Config } from '#server/platform/config.ts';
import type { FileStore } from '#server/platform/files.ts';
import type { Logger } from '#server/platform/logger.ts';

/** What the features are built from; made once in main, or by a test. */
export interface Deps {
  readonly config: Config;
  readonly database: Database;
  readonly files: FileStore;
  readonly jobs: JobPoke;
  readonly progress: ProgressFeed;
  readonly logger: Logger;
}
