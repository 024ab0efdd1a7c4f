import { countOpenChunks, endRun, lockRun } from '#server/data/assessment-run.repository.ts';
import type { UtilityTransaction } from '#server/data/database.ts';
import { makeCurrent } from '#server/data/findings.repository.ts';
import { closeFlags, openFlagsAndAlerts } from '#server/data/flags.repository.ts';
import { planDeliveries } from '../mail/plan-deliveries.ts';

/**
 * Ends an assessment whose chunks are all done: findings become current, flags and alerts follow, messages are asked
 * for. All in one transaction under the row lock, so that it happens once however many workers arrive here.
 */
export async function finishRun(
  tx: UtilityTransaction,
  assessmentId: string,
): Promise<'done' | 'cancelled' | 'open' | 'ended'> {
  const run = await lockRun(tx, assessmentId);
  if (run === null || run.state !== 'running') return 'ended';
  if (run.cancelRequestedAt !== null) {
    await endRun(tx, { assessmentId, state: 'cancelled', failureDetail: null });
    return 'cancelled';
  }
  if (run.frozenAt === null || (await countOpenChunks(tx, assessmentId)) > 0) return 'open';
  await makeCurrent(tx, assessmentId);
  await closeFlags(tx, assessmentId);
  const alertIds = await openFlagsAndAlerts(tx, assessmentId);
  await planDeliveries(tx, assessmentId, { alertIds, digestFromCount: run.basisSpec.digestFromCount });
  await endRun(tx, { assessmentId, state: 'done', failureDetail: null });
  return 'done';
}
