/* `npm run verify`: the checks that need no services, in under a minute. */
import { ensureNpmPackages, requireNode } from './setup.mjs';

requireNode();
ensureNpmPackages();
const { register } = await import('tsx/esm/api');
register();
const { runChecks } = await import('./checks/run-checks.ts');
process.exitCode = await runChecks('quick');
