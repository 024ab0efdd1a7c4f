import { auditEntrySchema, type peopleRoutes } from '#shared/contract/people.ts';
import type { QueryOf } from '#shared/contract/route.ts';
import { z } from 'zod';
import { keysetPage } from './cursor.ts';
import type { UtilityTransaction } from './database.ts';
import { instantColumn } from './rows.ts';

/** Audit log, newest first. */
export function listAudit(tx: UtilityTransaction, query: QueryOf<typeof peopleRoutes.listAudit>) {
  const where: string[] = [];
  if (query.thingKind !== undefined) where.push('audit_log.thing_kind = :thingKind');
  if (query.thingId !== undefined) where.push('audit_log.thing_id = :thingId');
  return keysetPage(tx, query, {
    schema: auditEntrySchema.extend({ id: z.coerce.string(), at: instantColumn }),
    columns: `audit_log.id, audit_log.at, people.display_name as person_name, audit_log.action, audit_log.thing_kind, audit_log.thing_id,
      audit_log.before, audit_log.after, audit_log.request_id`,
    from: 'audit_log left join people on people.id = audit_log.person_id',
    where,
    bindings: { thingKind: query.thingKind ?? null, thingId: query.thingId ?? null },
    key: { expression: 'audit_log.id', type: 'bigint', direction: 'descending' },
    id: 'audit_log.id',
    idType: 'bigint',
    countFrom: null,
  });
}
