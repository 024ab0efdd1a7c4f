import type { ImportProgress } from '#server/data/line-import-runs.ts';

/** Progress is told at most twice a second. */
const pauseMs = 500;

interface ReporterOptions {
  readonly tell: (progress: ImportProgress) => Promise<void>;
  readonly now?: () => number;
}

/** Passes progress on, a change of step always, the rest at most twice a second. */
export function createProgressReporter({ tell, now = Date.now }: ReporterOptions) {
  let toldStep: string | null = null;
  let toldAtMs = 0;
  return async (progress: ImportProgress): Promise<void> => {
    if (progress.step === toldStep && now() - toldAtMs < pauseMs) return;
    toldStep = progress.step;
    toldAtMs = now();
    await tell(progress);
  };
}
