import type { UtilityTransaction } from './database.ts';

type Scope =
  | { readonly kind: 'span-wire'; readonly spanWireId: string }
  | { readonly kind: 'wire'; readonly wireId: string }
  | { readonly kind: 'terrain-zone'; readonly terrainZoneId: string };

const conditions = {
  'span-wire': 'span_wires.id = :id',
  wire: 'span_wires.wire_id = :id',
  'terrain-zone': 'span_wires.span_id in (select id from spans where terrain_zone_id = :id)',
} as const;

function idOf(scope: Scope): string {
  if (scope.kind === 'span-wire') return scope.spanWireId;
  return scope.kind === 'wire' ? scope.wireId : scope.terrainZoneId;
}

/** Marks the findings that rest on a changed input; span wires without a finding have nothing to go stale. */
export async function markStale(tx: UtilityTransaction, scope: Scope, reason: string): Promise<number> {
  return tx.run(
    `update span_wires set is_stale = true, stale_reason = :reason
     where current_finding_id is not null and ${conditions[scope.kind]}`,
    { id: idOf(scope), reason },
  );
}
