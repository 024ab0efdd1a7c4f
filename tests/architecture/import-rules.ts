import type { ImportUse } from './project-files.ts';

const contractPackages = /^zod$/;
const tsOnlyFixtures = /^(vitest|fast-check|node:.*|typescript|@vue\/test-utils)$/;

interface Zone {
  readonly name: string;
  readonly path: RegExp;
  /** Zones of the project that it may import; itself always. */
  readonly zones: readonly string[];
  readonly packages: RegExp;
}

/** Who may import whom: the first zone whose path fits a file holds. */
export const zones: readonly Zone[] = [
  { name: 'engine', path: /^shared\/engine\//, zones: [], packages: /^$/ },
  { name: 'units-parse', path: /^shared\/units\/parse\.ts$/, zones: ['units'], packages: /^mathjs$/ },
  { name: 'units', path: /^shared\/units\//, zones: ['units-parse'], packages: /^$/ },
  { name: 'contract', path: /^shared\/contract\//, zones: ['engine', 'units'], packages: contractPackages },
  { name: 'platform', path: /^server\/platform\//, zones: ['contract'], packages: /^(pino|ioredis|zod|node:.*)$/ },
  {
    name: 'data',
    path: /^server\/data\//,
    zones: ['engine', 'units', 'contract', 'platform'],
    packages: /^(knex|pg|zod|node:.*)$/,
  },
  {
    name: 'engine-cli',
    path: /^server\/cli\/engine(-.*)?\.ts$/,
    zones: ['engine', 'units', 'contract'],
    packages: /^(zod|node:.*)$/,
  },
  { name: 'dev', path: /^server\/dev\//, zones: [], packages: /.*/ },
  {
    name: 'server',
    path: /^server\//,
    zones: ['engine', 'units', 'contract', 'platform', 'data'],
    packages: /^(?!bullmq$|vue|quasar|leaflet).*/,
  },
  {
    name: 'worker',
    path: /^worker\//,
    zones: ['engine', 'units', 'contract', 'platform', 'data'],
    packages: /^(?!express$|vue|quasar|leaflet).*/,
  },
  {
    name: 'client',
    path: /^src\//,
    zones: ['engine', 'units', 'units-parse', 'contract'],
    packages: /^(?!node:|express$|knex$|pg$|bullmq$|ioredis$).*/,
  },
  { name: 'migrations', path: /^migrations\//, zones: [], packages: /^knex$/ },
  { name: 'seeds', path: /^seeds\//, zones: [], packages: /^(node:.*|zod|geographiclib-geodesic)$/ },
  { name: 'oidc-fake', path: /^oidc-fake\//, zones: [], packages: /.*/ },
  { name: 'scripts', path: /^scripts\//, zones: ['oidc-fake', 'tests', 'data'], packages: /.*/ },
  {
    name: 'tests',
    path: /^tests\//,
    zones: [
      'engine',
      'units',
      'units-parse',
      'contract',
      'platform',
      'data',
      'engine-cli',
      'dev',
      'server',
      'worker',
      'client',
      'migrations',
      'seeds',
      'oidc-fake',
      'scripts',
    ],
    packages: /.*/,
  },
  { name: 'root', path: /^[^/]+\.ts$/, zones: [], packages: /.*/ },
];

const zoneOf = (path: string) => zones.find((zone) => zone.path.test(path));
const isTest = (path: string) => path.endsWith('.test.ts');

function sameFolderRule(use: ImportUse, folder: RegExp): string | null {
  const own = folder.exec(use.from)?.[1];
  const other = folder.exec(use.target ?? '')?.[1];
  return own !== undefined && other !== undefined && own !== other ? `${own} must not import ${other}` : null;
}

function reaches(use: ImportUse): string | null {
  const from = zoneOf(use.from);
  if (from === undefined) return `${use.from} lies in no zone`;
  if (use.target === null) {
    const isAllowed = from.packages.test(use.specifier) || (isTest(use.from) && tsOnlyFixtures.test(use.specifier));
    return isAllowed ? null : `${from.name} must not import the package ${use.specifier}`;
  }
  const to = zoneOf(use.target);
  if (to === undefined) return null;
  return to.name === from.name || from.zones.includes(to.name) ? null : `${from.name} must not import ${to.name}`;
}

/** What is wrong with an import, or null. */
export function faultOf(use: ImportUse): string | null {
  const isLoose = use.target !== null && !/\.(ts|mts|mjs|vue|json|css)$/.test(use.target);
  if (isLoose) return `${use.specifier} must be written with its extension`;
  if (isTest(use.from)) return null;
  const view = sameFolderRule(use, /^src\/views\/([^/]+)\//);
  const feature = sameFolderRule(use, /^server\/features\/([^/]+)\//);
  const isComponent = use.from.startsWith('src/components/') && /^src\/(views|router|api)\//.test(use.target ?? '');
  return (
    reaches(use) ??
    view ??
    feature ??
    (isComponent && !/api-problem|span-link/.test(use.target ?? '')
      ? 'components must not import views, router or api'
      : null)
  );
}
