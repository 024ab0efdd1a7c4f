import { z } from 'zod';
import type { LocalState } from './local-state.ts';
import { freePort, isFree } from './ports.ts';

const wishes = {
  postgres: 54320,
  redis: 63790,
  oidc: 8090,
  smtp: 10250,
  mail: 8025,
  forecast: 8095,
  vite: 5173,
} as const;
export type Ports = Record<keyof typeof wishes | 'server', number>;

/** Raised when a port that was asked for by name is in use. */
export class PortInUse extends Error {
  override readonly name = 'PortInUse';
}

async function serverPort(taken: Set<number>): Promise<number> {
  const configured = process.env['STILLSPAN_PORT'];
  if (configured === undefined || configured === '') return freePort(8080, taken);
  const parsed = z.coerce.number().int().min(1).max(65535).safeParse(configured);
  if (!parsed.success)
    throw new PortInUse(`STILLSPAN_PORT is ${JSON.stringify(configured)}; it must be a port from 1 to 65535.`);
  if (!(await isFree(parsed.data))) {
    throw new PortInUse(
      `Port ${parsed.data} (STILLSPAN_PORT) is in use. Stop what uses it, or choose another: STILLSPAN_PORT=8090 npm start`,
    );
  }
  taken.add(parsed.data);
  return parsed.data;
}

/** The ports of the last start where they are free, else the next free ones. A port that was asked for must be free. */
export async function choosePorts(state: LocalState): Promise<Ports> {
  const taken = new Set<number>();
  const server = await serverPort(taken);
  const entries: [string, number][] = [];
  for (const [name, wished] of Object.entries(wishes))
    entries.push([name, await freePort(state.ports[name] ?? wished, taken)]);
  const found = z.object({
    postgres: z.number(),
    redis: z.number(),
    oidc: z.number(),
    smtp: z.number(),
    mail: z.number(),
    forecast: z.number(),
    vite: z.number(),
  });
  return { server, ...found.parse(Object.fromEntries(entries)) };
}
