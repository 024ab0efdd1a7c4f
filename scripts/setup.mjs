/*
 * What must be there before anything else runs: npm packages and Debian packages. Plain JavaScript, because it runs
 * before the first `npm ci`.
 */
import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync, statSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

export const projectDirectory = fileURLToPath(new URL('..', import.meta.url));

/** Ends the program with a sentence that says what to do. */
export function giveUp(message) {
  process.stderr.write(`\n${message}\n`);
  process.exit(1);
}

function run(command, argumentsGiven, environment = {}) {
  const result = spawnSync(command, argumentsGiven, {
    cwd: projectDirectory,
    stdio: ['ignore', 'inherit', 'inherit'],
    env: { ...process.env, ...environment },
  });
  if (result.status !== 0) giveUp(`"${command} ${argumentsGiven.join(' ')}" failed.`);
}

function say(sentence) {
  process.stdout.write(`${sentence}\n`);
}

export function requireNode() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number);
  if (major !== 20 || minor < 20) giveUp(`Stillspan needs Node 20.20 or a later 20; this is ${process.versions.node}.`);
}

/** Installs npm packages when they are missing or older than the lock file. */
export function ensureNpmPackages() {
  const installed = `${projectDirectory}/node_modules/.package-lock.json`;
  const lock = `${projectDirectory}/package-lock.json`;
  if (existsSync(installed) && statSync(installed).mtimeMs >= statSync(lock).mtimeMs) return;
  if (existsSync(installed) && isSameLock(installed, lock)) return;
  say('Installing npm packages …');
  run('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error']);
}

/** A checkout touches the lock file; only its content decides. */
function isSameLock(installed, lock) {
  const wanted = JSON.parse(readFileSync(lock, 'utf8')).packages;
  const present = JSON.parse(readFileSync(installed, 'utf8')).packages;
  return Object.entries(wanted).every(([path, entry]) => {
    if (path === '' || entry.optional || entry.devOptional) return true;
    return present[path]?.version === entry.version;
  });
}

const postgresRoot = '/usr/lib/postgresql';

/** Versions of PostgreSQL whose server is installed, newest first. */
function postgresVersions() {
  if (!existsSync(postgresRoot)) return [];
  const versions = readdirSync(postgresRoot).map(Number).filter(Number.isInteger);
  return versions.filter((version) => existsSync(`${postgresRoot}/${version}/bin/postgres`)).sort((a, b) => b - a);
}

/** Folder of the PostgreSQL programs; the newest version that has PostGIS. */
export function findPostgres() {
  const version = postgresVersions().find(hasPostgis);
  if (version === undefined) giveUp('PostgreSQL with PostGIS is not installed.');
  return `${postgresRoot}/${version}/bin`;
}

function hasPostgis(version) {
  return existsSync(`/usr/share/postgresql/${version}/extension/postgis.control`);
}

function hasProgram(name) {
  return ['/usr/bin', '/usr/local/bin', '/bin', '/usr/sbin'].some((directory) => existsSync(`${directory}/${name}`));
}

/** Debian 12 has PostgreSQL 15; an installed newer one only lacks its PostGIS. */
const debianPostgresVersion = 15;

function missingPackages(wantsBrowser) {
  const missing = [];
  const versions = postgresVersions();
  if (!versions.some(hasPostgis)) {
    const version = versions[0] ?? debianPostgresVersion;
    if (versions.length === 0) missing.push(`postgresql-${version}`);
    missing.push(`postgresql-${version}-postgis-3`);
  }
  if (!hasProgram('redis-server')) missing.push('redis-server');
  if (wantsBrowser && !hasProgram('chromium')) missing.push('chromium', 'fonts-dejavu-core');
  return missing;
}

/** Installs the Debian packages that are missing; without the right to, says which. */
export function ensureDebianPackages({ wantsBrowser }) {
  const missing = missingPackages(wantsBrowser);
  if (missing.length === 0) return;
  const command = `apt-get install --no-install-recommends ${missing.join(' ')}`;
  if (process.getuid?.() !== 0 || !hasProgram('apt-get')) {
    giveUp(
      `These Debian packages are missing: ${missing.join(', ')}.\nInstall them as root and start again:\n  ${command}`,
    );
  }
  say(`Installing Debian packages: ${missing.join(', ')} …`);
  const quiet = { DEBIAN_FRONTEND: 'noninteractive' };
  run('apt-get', ['update', '-qq'], quiet);
  run('apt-get', ['install', '-y', '-qq', '--no-install-recommends', ...missing], quiet);
}
