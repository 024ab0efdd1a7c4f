import type { Request, Response } from 'express';

const keepAliveMs = 15_000;

/** Sends server-sent events until the source ends or the client leaves; the signal tells the source that it left. */
export async function sendEvents<T>(
  request: Request,
  response: Response,
  source: (signal: AbortSignal) => AsyncIterable<T>,
): Promise<void> {
  const left = new AbortController();
  request.on('close', () => left.abort());
  response.writeHead(200, {
    'Content-Type': 'text/event-stream; charset=utf-8',
    'Cache-Control': 'no-store',
    Connection: 'keep-alive',
    'X-Accel-Buffering': 'no',
  });
  response.write('retry: 2000\n\n');
  const keepAlive = setInterval(() => response.write(': still here\n\n'), keepAliveMs);
  try {
    for await (const event of source(left.signal)) {
      if (left.signal.aborted) break;
      response.write(`data: ${JSON.stringify(event)}\n\n`);
    }
  } finally {
    clearInterval(keepAlive);
    response.end();
  }
}
