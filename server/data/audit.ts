import type { UtilityTransaction } from './database.ts';

export interface AuditEntry {
  readonly action: string;
  readonly thingKind: string;
  readonly thingId: string;
  readonly before?: unknown;
  readonly after?: unknown;
}

/** Writes who did what, in the same transaction as the change itself. */
export async function writeAudit(tx: UtilityTransaction, entry: AuditEntry): Promise<void> {
  await tx.run(
    `insert into audit_log (utility_id, person_id, request_id, action, thing_kind, thing_id, before, after)
     values (:utilityId, :personId, :requestId, :action, :thingKind, :thingId, :before::jsonb, :after::jsonb)`,
    {
      ...tx.actor,
      action: entry.action,
      thingKind: entry.thingKind,
      thingId: entry.thingId,
      before: entry.before === undefined ? null : JSON.stringify(entry.before),
      after: entry.after === undefined ? null : JSON.stringify(entry.after),
    },
  );
}
