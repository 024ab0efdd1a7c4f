import { spawn, type ChildProcess } from 'node:child_process';
import { createWriteStream } from 'node:fs';
import { createConnection } from 'node:net';
import { setTimeout as pause } from 'node:timers/promises';

export interface ChildSpec {
  readonly name: string;
  readonly command: string;
  readonly arguments: readonly string[];
  readonly environment?: Readonly<Record<string, string>>;
  readonly directory?: string;
  /** What it prints goes here; without it, to this terminal. */
  readonly logFile?: string;
  readonly user?: { readonly uid: number; readonly gid: number };
  /** PostgreSQL shuts down fast on SIGINT; everything else ends on SIGTERM. */
  readonly stopSignal?: NodeJS.Signals;
  readonly stopWithinMs?: number;
}

/** A process that this program started and will stop. */
export class Child {
  readonly name: string;
  readonly #spec: ChildSpec;
  readonly #process: ChildProcess;
  readonly #exited: Promise<void>;
  #isStopping = false;

  constructor(spec: ChildSpec, onUnexpectedExit: (name: string, code: number | null) => void) {
    this.name = spec.name;
    this.#spec = spec;
    this.#process = spawn(spec.command, spec.arguments, {
      cwd: spec.directory ?? process.cwd(),
      env: { ...process.env, ...spec.environment },
      stdio: [
        'ignore',
        spec.logFile === undefined ? 'inherit' : 'pipe',
        spec.logFile === undefined ? 'inherit' : 'pipe',
      ],
      // Its own group, so that Ctrl-C reaches this program only and the order of stopping is kept.
      detached: true,
      ...(spec.user ?? {}),
    });
    if (spec.logFile !== undefined) this.#log(spec.logFile);
    this.#exited = new Promise((resolve) => {
      this.#process.once('error', () => resolve());
      this.#process.once('exit', (code) => {
        resolve();
        if (!this.#isStopping) onUnexpectedExit(spec.name, code);
      });
    });
  }

  get pid(): number | undefined {
    return this.#process.pid;
  }

  get hasExited(): boolean {
    return this.#process.exitCode !== null || this.#process.signalCode !== null;
  }

  #log(file: string): void {
    const stream = createWriteStream(file, { flags: 'a', mode: 0o640 });
    this.#process.stdout?.pipe(stream);
    this.#process.stderr?.pipe(stream);
  }

  /** Asks it to end, waits, and ends it when it does not. */
  async stop(): Promise<void> {
    this.#isStopping = true;
    if (this.hasExited) return;
    this.#process.kill(this.#spec.stopSignal ?? 'SIGTERM');
    const limitMs = this.#spec.stopWithinMs ?? 10_000;
    const timedOut = await Promise.race([this.#exited.then(() => false), pause(limitMs, true, { ref: false })]);
    if (timedOut) this.#process.kill('SIGKILL');
    await this.#exited;
  }

  /** Ends it at once, as a crash would. */
  async kill(): Promise<void> {
    this.#isStopping = true;
    this.#process.kill('SIGKILL');
    await this.#exited;
  }
}

/** Waits until something answers on a port. */
export async function waitForPort(
  port: number,
  options: { name: string; withinMs?: number; isDead?: () => boolean },
): Promise<void> {
  const until = Date.now() + (options.withinMs ?? 30_000);
  while (Date.now() < until) {
    if (options.isDead?.() === true) throw new Error(`${options.name} ended while it was starting`);
    const answers = await new Promise<boolean>((resolve) => {
      const socket = createConnection({ port, host: '127.0.0.1' });
      socket.once('connect', () => {
        socket.destroy();
        resolve(true);
      });
      socket.once('error', () => resolve(false));
    });
    if (answers) return;
    await pause(50);
  }
  throw new Error(`${options.name} does not answer on port ${port}`);
}
