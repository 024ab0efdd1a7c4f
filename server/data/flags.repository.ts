import { z } from 'zod';
import type { UtilityTransaction } from './database.ts';

/** Closes the flags of span wires whose new current finding is no longer Urgent. */
export async function closeFlags(tx: UtilityTransaction, assessmentId: string): Promise<void> {
  await tx.run(
    `update flags set closed_at = now(), closed_by_finding_id = findings.id
     from findings join span_wires on span_wires.id = findings.span_wire_id and span_wires.current_finding_id = findings.id
     where findings.assessment_id = :assessmentId and findings.grade <> 'urgent'
       and flags.span_wire_id = findings.span_wire_id and flags.closed_at is null`,
    { assessmentId },
  );
}

/** Opens a flag and its alert for each span wire that became Urgent; one that is flagged already gets no second. */
export async function openFlagsAndAlerts(tx: UtilityTransaction, assessmentId: string): Promise<string[]> {
  const rows = await tx.rows(
    z.object({ id: z.uuid() }),
    `with opened as (
       insert into flags (id, utility_id, span_wire_id, finding_id)
       select gen_random_uuid(), :utilityId, findings.span_wire_id, findings.id
       from findings join span_wires on span_wires.id = findings.span_wire_id and span_wires.current_finding_id = findings.id
       where findings.assessment_id = :assessmentId and findings.grade = 'urgent'
       on conflict (span_wire_id) where closed_at is null do nothing
       returning id, span_wire_id, finding_id
     )
     insert into alerts (id, utility_id, flag_id, finding_id, span_wire_id)
     select gen_random_uuid(), :utilityId, id, finding_id, span_wire_id from opened returning id`,
    { assessmentId, utilityId: tx.actor.utilityId },
  );
  return rows.map(({ id }) => id);
}

/** People who are told of Urgent spans. */
export async function listSafetyOfficerIds(tx: UtilityTransaction): Promise<string[]> {
  const rows = await tx.rows(
    z.object({ personId: z.uuid() }),
    `select person_id from person_roles where role = 'safety-officer'`,
  );
  return rows.map(({ personId }) => personId);
}

export interface NewDelivery {
  readonly id: string;
  readonly personId: string;
  readonly assessmentId: string;
  readonly isDigest: boolean;
  readonly alertIds: readonly string[];
}

/**
 * Plans one message. The ids of the alerts come from the caller: the tables were filled in this very transaction, and
 * the planner, which does not know how full they are, would join them row by row.
 */
export async function insertDelivery(tx: UtilityTransaction, delivery: NewDelivery): Promise<void> {
  const bindings = { ...delivery, utilityId: tx.actor.utilityId };
  await tx.run(
    `insert into deliveries (id, utility_id, person_id, assessment_id, is_digest)
     values (:id, :utilityId, :personId, :assessmentId, :isDigest)`,
    bindings,
  );
  await tx.run(
    `insert into delivery_alerts (delivery_id, alert_id, person_id, utility_id)
     select :id, alert_id, :personId, :utilityId from unnest(:alertIds::uuid[]) as alert_id`,
    bindings,
  );
}
