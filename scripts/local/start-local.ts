import { spawnSync } from 'node:child_process';
import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { migrateToLatest, openAsOwner } from '#server/data/migrate.ts';
import { demoPeople } from '../../oidc-fake/people.ts';
import { projectDirectory } from '../setup.mjs';
import { applicationEnvironment, publicUrl, type LocalInstallation } from './application-environment.ts';
import { buildClient } from './build-client.ts';
import { Child, waitForPort, type ChildSpec } from './child.ts';
import { choosePorts, PortInUse } from './choose-ports.ts';
import { dataDirectory, loadState, saveState } from './local-state.ts';
import { ensureDatabase, ensureRoles, startPostgres, superuserUrl } from './postgres.ts';
import { startRedis } from './redis.ts';

const isDev = process.argv.includes('--dev');
const children: Child[] = [];
let isStopping = false;

function say(sentence: string): void {
  process.stdout.write(`${sentence}\n`);
}

/** Stops everything in the reverse order of its start. */
async function stopAll(exitCode: number): Promise<never> {
  if (!isStopping) {
    isStopping = true;
    say('\nStopping …');
    for (const child of [...children].reverse()) await child.stop();
    say('Stopped. The data is kept.');
    process.exit(exitCode);
  }
  return new Promise(() => undefined);
}

function onUnexpectedExit(name: string, code: number | null): void {
  if (isStopping) return;
  say(`${name} ended by itself (code ${code ?? 'none'}); everything else is stopped too.`);
  void stopAll(1);
}

function start(spec: ChildSpec): Child {
  const child = new Child(spec, onUnexpectedExit);
  children.push(child);
  return child;
}

function runOnce(name: string, script: string[], environment: Record<string, string>): void {
  const result = spawnSync(process.execPath, ['--import', 'tsx', ...script], {
    cwd: projectDirectory,
    env: { ...process.env, ...environment },
    stdio: ['ignore', 'inherit', 'inherit'],
  });
  if (result.status !== 0) throw new Error(`${name} failed`);
}

async function startServices(installation: LocalInstallation, logs: string): Promise<void> {
  const { directory, state, ports } = installation;
  const shared = { directory, isThrowaway: false, onUnexpectedExit };
  const postgres = {
    ...shared,
    port: ports.postgres,
    superuserPassword: state.superuserPassword,
    logFile: join(logs, 'postgres.log'),
  };
  children.push(await startPostgres(postgres));
  children.push(await startRedis({ ...shared, port: ports.redis, logFile: join(logs, 'redis.log') }));
  await ensureRoles(superuserUrl(postgres), state);
  await ensureDatabase(postgres, 'stillspan');
}

function startStandIns(installation: LocalInstallation, environment: Record<string, string>, logs: string): void {
  const { directory, ports } = installation;
  const shared = { command: process.execPath, directory: projectDirectory, environment };
  start({
    ...shared,
    name: 'oidc-fake',
    arguments: ['--import', 'tsx', 'oidc-fake/main.ts'],
    logFile: join(logs, 'oidc-fake.log'),
  });
  const options = {
    'smtp-port': ports.smtp,
    'http-port': ports.mail,
    'forecast-port': ports.forecast,
    directory: join(directory, 'mail'),
  };
  const flags = Object.entries(options).map(([name, value]) => `--${name}=${value}`);
  const dev = ['--import', 'tsx', 'server/dev/main.ts', ...flags];
  start({ ...shared, name: 'mail sink and forecast fake', arguments: dev, logFile: join(logs, 'stand-ins.log') });
}

function startApplication(environment: Record<string, string>, installation: LocalInstallation, logs: string): void {
  const shared = { command: process.execPath, directory: projectDirectory, environment };
  const run = (script: string) =>
    isDev ? ['node_modules/tsx/dist/cli.mjs', 'watch', '--clear-screen=false', script] : ['--import', 'tsx', script];
  const log = (name: string) => (isDev ? {} : { logFile: join(logs, `${name}.log`) });
  start({ ...shared, name: 'server', arguments: run('server/main.ts'), ...log('server') });
  start({ ...shared, name: 'worker', arguments: run('worker/main.ts'), ...log('worker') });
  if (!isDev) return;
  const vite = [
    'node_modules/vite/bin/vite.js',
    '--host',
    '127.0.0.1',
    '--strictPort',
    '--port',
    String(installation.ports.vite),
  ];
  start({ ...shared, name: 'Vite', arguments: vite });
}

/** Migrates; true when no utility is there yet. In this process, because starting another takes seconds. */
async function bringUpToDate(ownerUrl: string): Promise<boolean> {
  const owner = openAsOwner(ownerUrl);
  try {
    for (const name of await migrateToLatest(owner)) say(`applied ${name}`);
    return (await owner('utilities').select('id').limit(1)).length === 0;
  } finally {
    await owner.destroy();
  }
}

async function waitUntilReady(port: number): Promise<void> {
  const until = Date.now() + 60_000;
  while (Date.now() < until) {
    const answer = await fetch(`http://127.0.0.1:${port}/health/ready`).catch(() => null);
    if (answer?.ok === true) return;
    await pause(100);
  }
  throw new Error('the server did not become ready within a minute');
}

function announce({ ports, directory }: LocalInstallation, logs: string): void {
  const people = demoPeople.map(
    ({ name, roles, utility }) => `  ${name.padEnd(18)} ${utility.padEnd(6)} ${roles.join(', ')}`,
  );
  say(`
Stillspan runs:  ${publicUrl(ports, isDev)}

Sign in and click one of the demo people:
${people.join('\n')}

Mail that it sends:  http://127.0.0.1:${ports.mail}
Data: ${directory}   Logs: ${logs}
Ctrl-C stops everything.`);
}

async function startEverything(): Promise<void> {
  const directory = dataDirectory(projectDirectory);
  const logs = join(directory, 'logs');
  const state = loadState(directory);
  mkdirSync(logs, { recursive: true });
  const ports = await choosePorts(state);
  saveState(directory, { ...state, ports });
  const installation = { directory, state, ports };
  const environment = applicationEnvironment(installation, isDev);
  say('Starting PostgreSQL and Redis …');
  await startServices(installation, logs);
  startStandIns(installation, environment, logs);
  if (await bringUpToDate(environment['DATABASE_OWNER_URL'] ?? ''))
    runOnce('loading the demo', ['worker/cli/seed.ts'], environment);
  if (!isDev) buildClient(projectDirectory);
  startApplication(environment, installation, logs);
  await waitUntilReady(ports.server);
  await waitForPort(ports.oidc, { name: `oidc-fake (log in ${logs})` });
  announce(installation, logs);
}

/** npm does not pass every signal on; when it is gone, so is the person who could press Ctrl-C. */
function stopWithParent(): void {
  const parent = process.ppid;
  setInterval(() => {
    if (process.ppid !== parent) void stopAll(0);
  }, 1000).unref();
}

stopWithParent();
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, () => void stopAll(0));
try {
  await startEverything();
} catch (error) {
  if (!isStopping) {
    const message =
      error instanceof PortInUse
        ? error.message
        : error instanceof Error
          ? (error.stack ?? error.message)
          : String(error);
    process.stderr.write(`\n${message}\n`);
    await stopAll(1);
  }
}
