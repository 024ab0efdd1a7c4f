import { randomUUID } from 'node:crypto';
import { z } from 'zod';
import type { UtilityTransaction } from '#server/data/database.ts';
import { insertPlacement } from '#server/data/placements.repository.ts';
import { sides, type Side } from '#shared/contract/placements.ts';
import { readDampers } from './demo-data.ts';

const spanWireRow = z.object({ id: z.uuid(), spanIndex: z.number(), wireName: z.string(), isFitted: z.boolean() });
type SpanWire = z.infer<typeof spanWireRow>;

interface Placing {
  readonly spanWire: SpanWire;
  readonly side: Side;
  readonly damperTypeId: string;
  readonly distanceM: number;
  readonly state: 'planned' | 'as-built';
  readonly plannedDistanceM: number | null;
}

/** Fitted long before the demo begins, so that nothing turns stale by it. */
const fittedAt = '2024-05-14T09:00:00Z';
const plannedAt = '2026-09-01T09:00:00Z';

function spanWiresOf(tx: UtilityTransaction, lineName: string): Promise<SpanWire[]> {
  return tx.rows(
    spanWireRow,
    `select span_wires.id, (dense_rank() over (order by sections.order_index, spans.order_index) - 1)::int as span_index, wires.name as wire_name,
       exists (select from placements where placements.span_wire_id = span_wires.id) as is_fitted
     from span_wires
     join spans on spans.id = span_wires.span_id
     join sections on sections.id = spans.section_id
     join lines on lines.id = spans.line_id
     join wires on wires.id = span_wires.wire_id
     where lines.name = :lineName order by span_index, wire_name`,
    { lineName },
  );
}

async function damperTypeIdOf(tx: UtilityTransaction, name: string): Promise<string> {
  const row = await tx.first(z.object({ id: z.uuid() }), 'select id from damper_types where name = :name', { name });
  if (row === null) throw new Error(`the demo names the damper type ${name}, which is not in its catalogue`);
  return row.id;
}

function place(tx: UtilityTransaction, placing: Placing): Promise<void> {
  const { spanWire, side, damperTypeId, distanceM, state, plannedDistanceM } = placing;
  return insertPlacement(tx, {
    id: randomUUID(),
    spanWireId: spanWire.id,
    side,
    damperTypeId,
    distanceM,
    plannedDistanceM,
    state,
    replacesPlacementId: null,
    startedAt: state === 'planned' ? plannedAt : fittedAt,
    photoFileId: null,
    note: '',
  });
}

/** Every nth span in a fixed pattern: the same spans at every seeding. */
function isChosen(spanIndex: number, perHundredCount: number): boolean {
  return (spanIndex * 37) % 100 < perHundredCount;
}

async function loadFitted(tx: UtilityTransaction): Promise<void> {
  const { fitted, badlyPlaced } = readDampers();
  for (const rule of fitted) {
    const damperTypeId = await damperTypeIdOf(tx, rule.damperType);
    for (const spanWire of await spanWiresOf(tx, rule.line)) {
      if (!rule.wires.includes(spanWire.wireName) || !isChosen(spanWire.spanIndex, rule.spansPerHundredCount)) continue;
      // The badly placed damper stands alone on its span wire, so that what it fails to absorb shows.
      const isBad =
        rule.line === badlyPlaced.line &&
        spanWire.spanIndex === badlyPlaced.spanIndex &&
        spanWire.wireName === badlyPlaced.wire;
      for (const side of isBad ? [badlyPlaced.side] : sides) {
        const distanceM = isBad ? badlyPlaced.distanceM : rule.distanceM;
        await place(tx, {
          spanWire,
          side,
          damperTypeId,
          distanceM,
          state: 'as-built',
          plannedDistanceM: rule.distanceM,
        });
      }
    }
  }
}

async function loadPlanned(tx: UtilityTransaction): Promise<void> {
  for (const rule of readDampers().planned) {
    const damperTypeId = await damperTypeIdOf(tx, rule.damperType);
    for (const spanWire of await spanWiresOf(tx, rule.line)) {
      const isInside =
        spanWire.spanIndex >= rule.fromSpanIndex && spanWire.spanIndex < rule.fromSpanIndex + rule.spanCount;
      if (!isInside || spanWire.isFitted || !rule.wires.includes(spanWire.wireName)) continue;
      for (const side of sides)
        await place(tx, {
          spanWire,
          side,
          damperTypeId,
          distanceM: rule.distanceM,
          state: 'planned',
          plannedDistanceM: null,
        });
    }
  }
}

/** Dampers of the demo: fitted ones (one of them badly placed) and planned ones for the crew. */
export async function loadDampers(tx: UtilityTransaction): Promise<void> {
  await loadFitted(tx);
  await loadPlanned(tx);
}
