import type { Transporter } from 'nodemailer';
import type { Database } from '#server/data/database.ts';
import type { Config } from '#server/platform/config.ts';
import type { FileStore } from '#server/platform/files.ts';
import type { Logger } from '#server/platform/logger.ts';
import type { CancelWatch } from './assessment/cancel-watch.ts';

/** What every handler is given; made once in main, or by a test. */
export interface WorkerContext {
  readonly config: Config;
  readonly database: Database;
  readonly files: FileStore;
  readonly logger: Logger;
  readonly mailer: Pick<Transporter, 'sendMail'>;
  readonly cancels: CancelWatch;
  /** Says over Redis that a row has moved; at most twice a second for one row. */
  readonly publishProgress: (kind: 'assessment' | 'import', id: string) => void;
  /** Says that the outbox holds something; the dispatcher looks at once instead of at its next poll. */
  readonly outboxFilled: () => void;
}
