/* `npm start` and, with --dev, `npm run dev`: installs what is missing, then starts everything. */
import { ensureDebianPackages, ensureNpmPackages, requireNode } from './setup.mjs';

requireNode();
ensureNpmPackages();
ensureDebianPackages({ wantsBrowser: false });
const { register } = await import('tsx/esm/api');
register();
await import('./local/start-local.ts');
