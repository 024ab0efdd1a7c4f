import { z } from 'zod';

const port = z.coerce.number().int().min(1).max(65535);
const httpUrl = z.url({ protocol: /^https?$/, error: 'must be an http or https address' });

const configSchema = z.object({
  STILLSPAN_HOST: z.string().min(1).default('127.0.0.1'),
  STILLSPAN_PORT: port.default(8080),
  STILLSPAN_PUBLIC_URL: httpUrl.default('http://127.0.0.1:8080'),
  DATABASE_URL: z.url({ protocol: /^postgres(ql)?$/, error: 'must be a postgres:// address' }),
  REDIS_URL: z.url({ protocol: /^rediss?$/, error: 'must be a redis:// address' }),
  STILLSPAN_SESSION_SECRET: z.string().min(32, 'must be at least 32 characters long'),
  STILLSPAN_SESSION_IDLE_MINUTES: z.coerce.number().int().min(1).max(1440).default(60),
  STILLSPAN_SESSION_ABSOLUTE_HOURS: z.coerce.number().int().min(1).max(168).default(12),
  OIDC_ISSUER_URL: httpUrl,
  OIDC_CLIENT_ID: z.string().min(1),
  OIDC_CLIENT_SECRET: z.string().min(1),
  OIDC_UTILITY_CLAIM: z.string().min(1).default('stillspan_utility'),
  OIDC_ROLES_CLAIM: z.string().min(1).default('stillspan_roles'),
  SMTP_URL: z.url({ protocol: /^smtps?$/, error: 'must be an smtp:// or smtps:// address' }),
  STILLSPAN_MAIL_FROM: z.string().min(3).default('Stillspan <stillspan@localhost.localdomain>'),
  STILLSPAN_FILES_DIR: z.string().min(1),
  STILLSPAN_CLIENT_DIR: z.string().min(1).default('dist'),
  STILLSPAN_TILE_URL: z
    .string()
    .regex(/^https?:\/\/.+\{z\}.+\{x\}.+\{y\}/, 'must be a tile template with {z}, {x} and {y}')
    .optional(),
  STILLSPAN_FORECAST_URL: httpUrl.optional(),
  STILLSPAN_LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent']).default('info'),
  STILLSPAN_WORKER_CONCURRENCY: z.coerce.number().int().min(1).max(32).default(2),
  STILLSPAN_TRUST_PROXY: z.enum(['true', 'false']).default('false'),
});

/** Settings of server and worker; a frozen copy of the environment, checked once. */
export type Config = Readonly<z.infer<typeof configSchema>>;
export const configKeys = Object.keys(configSchema.shape);

/** Raised at start when settings are missing or wrong; its message lists each by name with what is allowed. */
export class ConfigError extends Error {
  override readonly name = 'ConfigError';
}

function shownValue(key: string, value: string | undefined): string {
  if (value === undefined || value === '') return 'not set';
  return /SECRET|DATABASE_URL|REDIS_URL|SMTP_URL/.test(key) ? 'set, not shown' : JSON.stringify(value);
}

/** Reads the environment once; empty values count as not set. */
export function loadConfig(environment: Record<string, string | undefined> = process.env): Config {
  const given = Object.fromEntries(
    configKeys.map((key) => [key, environment[key] === '' ? undefined : environment[key]]),
  );
  const parsed = configSchema.safeParse(given);
  if (parsed.success) return Object.freeze(parsed.data);
  const lines = parsed.error.issues.map((issue) => {
    const key = String(issue.path[0]);
    return `  ${key} (${shownValue(key, environment[key])}): ${issue.message}`;
  });
  throw new ConfigError(
    `Settings that stop the start:\n${lines.join('\n')}\nThe table in README.md lists every setting.`,
  );
}

/** The settings, or the end of the process with a sentence for the operator. */
export function loadConfigOrExit(): Config {
  try {
    return loadConfig();
  } catch (error) {
    if (!(error instanceof ConfigError)) throw error;
    process.stderr.write(`${error.message}\n`);
    process.exit(2);
  }
}

/** Address of the database as its owner; only migrations and the first set-up of a utility use it. */
export function loadOwnerDatabaseUrl(environment: Record<string, string | undefined> = process.env): string {
  const parsed = z.url({ protocol: /^postgres(ql)?$/ }).safeParse(environment['DATABASE_OWNER_URL']);
  if (parsed.success) return parsed.data;
  throw new ConfigError('DATABASE_OWNER_URL: must be the postgres:// address of the role that owns the database');
}
