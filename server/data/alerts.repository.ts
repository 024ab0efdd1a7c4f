import { z } from 'zod';
import { alertSchema, type Alert, type alertRoutes } from '#shared/contract/alerts.ts';
import type { QueryOf } from '#shared/contract/route.ts';
import { keysetPage } from './cursor.ts';
import type { UtilityTransaction } from './database.ts';
import { instantColumn } from './rows.ts';

const deliveryRow = z.object({
  recipientName: z.string(),
  state: z.enum(['waiting', 'sent', 'failed']),
  sentAt: z
    .string()
    .nullable()
    .transform((text) => (text === null ? null : new Date(text).toISOString())),
  isDigest: z.boolean(),
  attemptCount: z.number(),
  failureDetail: z.string().nullable(),
});
const rowSchema = alertSchema.extend({
  openedAt: instantColumn,
  acknowledgedAt: instantColumn.nullable(),
  closedAt: instantColumn.nullable(),
  deliveries: z.array(deliveryRow),
});

const columns = `alerts.id, alerts.state, findings.grade, alerts.span_wire_id, spans.id as span_id, span_wires.section_id, alerts.finding_id,
  lines.name as line_name, first_structure.name || '–' || second_structure.name as span_label, wires.name as wire_name,
  findings.reasons -> 0 as leading_reason, alerts.opened_at, alerts.acknowledged_at, acknowledger.display_name as acknowledged_by_name,
  alerts.closed_at, closer.display_name as closed_by_name, alerts.note, alerts.version_number,
  coalesce((
    select json_agg(json_build_object('recipientName', people.display_name, 'state', deliveries.state, 'sentAt', deliveries.sent_at,
      'isDigest', deliveries.is_digest, 'attemptCount', deliveries.attempt_count, 'failureDetail', deliveries.failure_detail)
      order by people.display_name)
    from delivery_alerts
    join deliveries on deliveries.id = delivery_alerts.delivery_id
    join people on people.id = deliveries.person_id
    where delivery_alerts.alert_id = alerts.id
  ), '[]') as deliveries`;
const from = `alerts
  join findings on findings.id = alerts.finding_id
  join span_wires on span_wires.id = alerts.span_wire_id
  join wires on wires.id = span_wires.wire_id
  join spans on spans.id = span_wires.span_id
  join lines on lines.id = spans.line_id
  join structures as first_structure on first_structure.id = spans.from_structure_id
  join structures as second_structure on second_structure.id = spans.to_structure_id
  left join people as acknowledger on acknowledger.id = alerts.acknowledged_by_person_id
  left join people as closer on closer.id = alerts.closed_by_person_id`;

export function findAlert(tx: UtilityTransaction, alertId: string): Promise<Alert | null> {
  return tx.first(rowSchema, `select ${columns} from ${from} where alerts.id = :alertId`, { alertId });
}

/** Alerts, open ones first, newest first. */
export function listAlerts(tx: UtilityTransaction, query: QueryOf<typeof alertRoutes.listAlerts>) {
  return keysetPage(tx, query, {
    schema: rowSchema,
    columns,
    from,
    where: query.states === undefined ? [] : ['alerts.state = any(:states::alert_state[])'],
    bindings: query.states === undefined ? {} : { states: query.states },
    // State and time in one number: open alerts stand above acknowledged ones, closed ones last.
    key: {
      expression: `(extract(epoch from alerts.opened_at)::double precision
        - array_position(enum_range(null::alert_state), alerts.state) * 1e11)`,
      type: 'double precision',
      direction: 'descending',
    },
    id: 'alerts.id',
    countFrom: 'alerts',
  });
}

/** Moves an alert to the next state; false when it is not in one of the states it may leave. */
export async function moveAlert(
  tx: UtilityTransaction,
  alert: { id: string; to: 'acknowledged' | 'closed'; note: string },
): Promise<boolean> {
  const stamp = alert.to === 'acknowledged' ? 'acknowledged' : 'closed';
  const touched = await tx.run(
    `update alerts set state = :to::alert_state, ${stamp}_at = now(), ${stamp}_by_person_id = :personId,
       note = case when :note = '' then note else :note end, version_number = version_number + 1
     where id = :id and state <> 'closed' and state <> :to::alert_state`,
    { ...alert, personId: tx.actor.personId },
  );
  return touched === 1;
}
