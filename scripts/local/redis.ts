import { existsSync, mkdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { Child, waitForPort } from './child.ts';

export interface RedisSettings {
  readonly directory: string;
  readonly port: number;
  readonly isThrowaway: boolean;
  readonly logFile: string;
  readonly onUnexpectedExit: (name: string, code: number | null) => void;
}

/** A Redis left over from a start that was killed; its pid file is in our directory, so it is ours to stop. */
function stopLeftOver(pidFile: string): void {
  if (!existsSync(pidFile)) return;
  const pid = Number(readFileSync(pidFile, 'utf8').trim());
  const commandFile = `/proc/${pid}/cmdline`;
  if (existsSync(commandFile) && readFileSync(commandFile, 'utf8').includes('redis-server'))
    process.kill(pid, 'SIGTERM');
}

/** Starts redis-server on loopback; it never evicts, because an evicted job would be a lost one. */
export async function startRedis(settings: RedisSettings): Promise<Child> {
  const directory = join(settings.directory, 'redis');
  const pidFile = join(directory, 'redis.pid');
  mkdirSync(directory, { recursive: true, mode: 0o700 });
  stopLeftOver(pidFile);
  const options = {
    port: String(settings.port),
    bind: '127.0.0.1',
    dir: directory,
    pidfile: pidFile,
    daemonize: 'no',
    'maxmemory-policy': 'noeviction',
    appendonly: settings.isThrowaway ? 'no' : 'yes',
    save: settings.isThrowaway ? '' : '300 10',
  };
  const child = new Child(
    {
      name: 'Redis',
      command: 'redis-server',
      arguments: Object.entries(options).flatMap(([key, value]) => [`--${key}`, value]),
      logFile: settings.logFile,
    },
    settings.onUnexpectedExit,
  );
  await waitForPort(settings.port, { name: `Redis (log: ${settings.logFile})`, isDead: () => child.hasExited });
  return child;
}
