import { createServer } from 'node:net';

/** True when nothing listens on the port of the loopback address. */
export function isFree(port: number, host = '127.0.0.1'): Promise<boolean> {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', () => resolve(false));
    probe.listen(port, host, () => probe.close(() => resolve(true)));
  });
}

const triesCount = 200;

/** The wished port, or the next free one; ports in `taken` are promised to somebody already. */
export async function freePort(wished: number, taken: Set<number> = new Set()): Promise<number> {
  for (let port = wished; port < wished + triesCount; port += 1) {
    if (!taken.has(port) && (await isFree(port))) {
      taken.add(port);
      return port;
    }
  }
  throw new Error(`no free port from ${wished} to ${wished + triesCount - 1}`);
}
