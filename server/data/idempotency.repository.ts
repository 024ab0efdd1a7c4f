import { z } from 'zod';
import type { UtilityTransaction } from './database.ts';

const formerSchema = z.object({
  routeName: z.string(),
  requestHash: z.string(),
  status: z.number().nullable(),
  response: z.unknown(),
});

/** Claims a key; null when it was free, else what it was used for. Unfinished claims lapse after two minutes. */
export async function claimKey(
  tx: UtilityTransaction,
  claim: { key: string; routeName: string; requestHash: string },
): Promise<z.infer<typeof formerSchema> | null> {
  const bindings = { ...claim, utilityId: tx.actor.utilityId, personId: tx.actor.personId };
  await tx.run(
    `delete from idempotency_keys where person_id = :personId and idempotency_key = :key
       and (created_at < now() - interval '24 hours' or (status is null and created_at < now() - interval '2 minutes'))`,
    bindings,
  );
  const claimed = await tx.run(
    `insert into idempotency_keys (utility_id, person_id, idempotency_key, route_name, request_hash)
     values (:utilityId, :personId, :key, :routeName, :requestHash) on conflict do nothing`,
    bindings,
  );
  if (claimed === 1) return null;
  return tx.first(
    formerSchema,
    'select route_name, request_hash, status, response from idempotency_keys where person_id = :personId and idempotency_key = :key',
    bindings,
  );
}

/** Keeps the answer of a key for a day. */
export async function keepAnswer(
  tx: UtilityTransaction,
  key: string,
  answer: { status: number; body: unknown },
): Promise<void> {
  await tx.run(
    `update idempotency_keys set status = :status, response = :body::jsonb where person_id = :personId and idempotency_key = :key`,
    { key, personId: tx.actor.personId, status: answer.status, body: JSON.stringify(answer.body ?? null) },
  );
}

/** Frees a key whose request was refused, so that it can be sent again. */
export async function forgetKey(tx: UtilityTransaction, key: string): Promise<void> {
  await tx.run('delete from idempotency_keys where person_id = :personId and idempotency_key = :key', {
    key,
    personId: tx.actor.personId,
  });
}
