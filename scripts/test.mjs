/* `npm test`: installs what is missing, then runs every check; the last line counts them. */
import { ensureDebianPackages, ensureNpmPackages, requireNode } from './setup.mjs';

requireNode();
ensureNpmPackages();
ensureDebianPackages({ wantsBrowser: true });
const { register } = await import('tsx/esm/api');
register();
const { runChecks } = await import('./checks/run-checks.ts');
process.exitCode = await runChecks('everything');
