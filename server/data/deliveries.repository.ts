import { z } from 'zod';
import { reasonSchema } from '#shared/contract/reasons.ts';
import type { UtilityTransaction } from './database.ts';

const deliverySchema = z.object({
  id: z.uuid(),
  state: z.enum(['waiting', 'sent', 'failed']),
  isDigest: z.boolean(),
  recipientName: z.string(),
  recipientEmail: z.string(),
  utilityName: z.string(),
});
const alertLineSchema = z.object({
  alertId: z.uuid(),
  spanId: z.uuid(),
  sectionId: z.uuid(),
  wireId: z.uuid(),
  lineName: z.string(),
  spanLabel: z.string(),
  wireName: z.string(),
  isAssumed: z.boolean(),
  reasons: z.array(reasonSchema),
});
export type Delivery = z.infer<typeof deliverySchema>;
export type AlertLine = z.infer<typeof alertLineSchema>;

/** A delivery locked for sending, so that two workers never send it at once; null when it is gone or being sent. */
export function lockDelivery(tx: UtilityTransaction, deliveryId: string): Promise<Delivery | null> {
  return tx.first(
    deliverySchema,
    `select deliveries.id, deliveries.state, deliveries.is_digest, people.display_name as recipient_name,
       people.email as recipient_email, utilities.name as utility_name
     from deliveries
     join people on people.id = deliveries.person_id
     join utilities on utilities.id = deliveries.utility_id
     where deliveries.id = :deliveryId for update of deliveries skip locked`,
    { deliveryId },
  );
}

/** What a delivery tells of: one alert, or all of a digest, worst first. */
export function listDeliveryAlerts(tx: UtilityTransaction, deliveryId: string): Promise<AlertLine[]> {
  return tx.rows(
    alertLineSchema,
    `select alerts.id as alert_id, spans.id as span_id, span_wires.section_id, span_wires.wire_id, lines.name as line_name,
       first_structure.name || '–' || second_structure.name as span_label, wires.name as wire_name,
       (spans.is_assumed or wires.is_assumed) as is_assumed, findings.reasons
     from delivery_alerts
     join alerts on alerts.id = delivery_alerts.alert_id
     join findings on findings.id = alerts.finding_id
     join span_wires on span_wires.id = alerts.span_wire_id
     join wires on wires.id = span_wires.wire_id
     join spans on spans.id = span_wires.span_id
     join lines on lines.id = spans.line_id
     join structures as first_structure on first_structure.id = spans.from_structure_id
     join structures as second_structure on second_structure.id = spans.to_structure_id
     where delivery_alerts.delivery_id = :deliveryId
     order by findings.utilisation_ratio desc nulls first, alerts.id`,
    { deliveryId },
  );
}

export async function markSent(tx: UtilityTransaction, deliveryId: string): Promise<void> {
  await tx.run(
    `update deliveries set state = 'sent', sent_at = now(), attempt_count = attempt_count + 1, failure_detail = null where id = :deliveryId`,
    { deliveryId },
  );
}

/** Notes a failed attempt; after the last one the delivery is failed and shows so. */
export async function noteFailure(
  tx: UtilityTransaction,
  failure: { deliveryId: string; detail: string; isLast: boolean },
): Promise<void> {
  await tx.run(
    `update deliveries set attempt_count = attempt_count + 1, failure_detail = :detail,
       state = case when :isLast then 'failed'::delivery_state else state end
     where id = :deliveryId and state <> 'sent'`,
    failure,
  );
}

/** Deliveries that wait, oldest first; the reconciler sees to it that each has a job. */
export async function listWaitingDeliveries(tx: UtilityTransaction): Promise<string[]> {
  const rows = await tx.rows(
    z.object({ id: z.uuid() }),
    `select id from deliveries where state = 'waiting' order by created_at limit 500`,
  );
  return rows.map(({ id }) => id);
}
