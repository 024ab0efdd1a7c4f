import { randomUUID } from 'node:crypto';
import type { UtilityTransaction } from '#server/data/database.ts';
import { insertDelivery, listSafetyOfficerIds } from '#server/data/flags.repository.ts';
import { askForJob } from '#server/data/outbox.ts';

/**
 * Plans one message an alert and safety officer or, from `digestFromCount` alerts on, one an officer that lists them all.
 * The key (alert, person) makes a second plan impossible.
 */
export async function planDeliveries(
  tx: UtilityTransaction,
  assessmentId: string,
  news: { readonly alertIds: readonly string[]; readonly digestFromCount: number },
): Promise<void> {
  const { alertIds, digestFromCount } = news;
  if (alertIds.length === 0) return;
  const { utilityId } = tx.actor;
  const isDigest = alertIds.length >= digestFromCount;
  const messages = isDigest ? [alertIds] : alertIds.map((alertId) => [alertId]);
  for (const personId of await listSafetyOfficerIds(tx)) {
    for (const told of messages) {
      const id = randomUUID();
      await insertDelivery(tx, { id, personId, assessmentId, isDigest, alertIds: told });
      const payload = { payloadVersion: 1 as const, utilityId, deliveryId: id };
      await askForJob(tx, { name: 'send-mail', payload, dedupeKey: `send-mail-${id}` });
    }
  }
}
