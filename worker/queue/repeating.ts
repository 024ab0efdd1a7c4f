import type { Logger } from '#server/platform/logger.ts';

export interface Repeating {
  /** Runs at once, or right after the run that is going on. */
  readonly now: () => void;
  readonly stop: () => Promise<void>;
}

/** Runs something again and again, one run at a time; a failed run is logged and the next one comes as usual. */
export function repeating(
  name: string,
  everyMs: number,
  work: { run: () => Promise<void>; logger: Logger },
): Repeating {
  let timer: NodeJS.Timeout | null = null;
  let current: Promise<void> | null = null;
  let isWanted = false;
  let isStopped = false;
  const turn = (): void => {
    if (timer !== null) clearTimeout(timer);
    if (isStopped) return;
    if (current !== null) {
      isWanted = true;
      return;
    }
    current = work
      .run()
      .catch((error: unknown) => work.logger.warn({ err: error }, `${name} failed; it is tried again`));
    void current.then(() => {
      current = null;
      if (isStopped) return;
      timer = setTimeout(turn, isWanted ? 0 : everyMs);
      isWanted = false;
    });
  };
  turn();
  return {
    now: turn,
    stop: async () => {
      isStopped = true;
      if (timer !== null) clearTimeout(timer);
      await current;
    },
  };
}
