import { z } from 'zod';
import type { UtilityTransaction } from './database.ts';

/** Closes the flags of span wires whose new current finding is no longer Urgent. */
export async function closeFlags(tx: UtilityTransaction, assessmentId: string): Promise<void> {
  await tx.run(
    `update flags set closed_at = now(), closed_by_finding_id = findings.id
     from findings join span_wires on span_wires.current_finding_id = findings.id
     where findings.assessment_id = :assessmentId and findings.grade <> 'urgent'
       and flags.span_wire_id = findings.span_wire_id and flags.closed_at is null`,
    { assessmentId },
  );
}

/** Opens a flag and its alert for each span wire that became Urgent; one that is flagged already gets no second. */
export async function openFlagsAndAlerts(tx: UtilityTransaction, assessmentId: string): Promise<number> {
  return tx.run(
    `with opened as (
       insert into flags (id, utility_id, span_wire_id, finding_id)
       select gen_random_uuid(), :utilityId, findings.span_wire_id, findings.id
       from findings join span_wires on span_wires.current_finding_id = findings.id
       where findings.assessment_id = :assessmentId and findings.grade = 'urgent'
       on conflict (span_wire_id) where closed_at is null do nothing
       returning id, span_wire_id, finding_id
     )
     insert into alerts (id, utility_id, flag_id, finding_id, span_wire_id)
     select gen_random_uuid(), :utilityId, id, finding_id, span_wire_id from opened`,
    { assessmentId, utilityId: tx.actor.utilityId },
  );
}

/**
 * Plans one message per alert and safety officer, or, from `digestFromCount` alerts on, one message per officer that
 * lists them all. Returns the ids of the new deliveries. The primary key (alert, person) makes a second plan impossible.
 */
export async function planDeliveries(
  tx: UtilityTransaction,
  assessmentId: string,
  digestFromCount: number,
): Promise<string[]> {
  const rows = await tx.rows(
    z.object({ id: z.uuid() }),
    `with fresh as (
       select alerts.id as alert_id from alerts join findings on findings.id = alerts.finding_id
       where findings.assessment_id = :assessmentId
         and not exists (select from delivery_alerts where delivery_alerts.alert_id = alerts.id)
     ), mode as (
       select count(*) >= :digestFromCount as is_digest from fresh
     ), pairs as (
       select fresh.alert_id, person_roles.person_id, mode.is_digest from fresh, mode, person_roles where person_roles.role = 'safety-officer'
     ), planned as (
       select gen_random_uuid() as id, person_id, is_digest, case when is_digest then null else alert_id end as alert_id
       from pairs group by person_id, is_digest, case when is_digest then null else alert_id end
     ), inserted as (
       insert into deliveries (id, utility_id, person_id, assessment_id, is_digest)
       select id, :utilityId, person_id, :assessmentId, is_digest from planned returning id
     ), linked as (
       insert into delivery_alerts (delivery_id, alert_id, person_id, utility_id)
       select planned.id, pairs.alert_id, pairs.person_id, :utilityId
       from pairs join planned on planned.person_id = pairs.person_id and (planned.alert_id is null or planned.alert_id = pairs.alert_id)
     )
     select id from inserted`,
    { assessmentId, digestFromCount, utilityId: tx.actor.utilityId },
  );
  return rows.map(({ id }) => id);
}
