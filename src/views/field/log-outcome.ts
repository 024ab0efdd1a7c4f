import type { FindingSummary } from '#shared/contract/findings.ts';
import type { FieldLog } from '#shared/contract/placements.ts';

/** The result before a damper was logged, and the one after it. */
export interface LogOutcome {
  /** Null when the span wire had not been assessed. */
  readonly former: FindingSummary | null;
  /** Null until the re-assessment has come that far. */
  readonly now: FindingSummary | null;
}

/** Sorts the newest findings of the span wire into the one this log led to and the one before. */
export function logOutcome(log: FieldLog, newestFirst: readonly FindingSummary[]): LogOutcome {
  const index = newestFirst.findIndex((finding) => finding.assessmentId === log.assessmentId);
  if (index === -1) return { former: newestFirst[0] ?? null, now: null };
  return { former: newestFirst[index + 1] ?? null, now: newestFirst[index] ?? null };
}
