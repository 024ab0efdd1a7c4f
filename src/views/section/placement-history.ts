import type { Placement, Side } from '#shared/contract/placements.ts';

/** One place at an end of a span wire: what is planned there, what stands there, how far they are apart. */
export interface PlacementPair {
  readonly key: string;
  readonly planned: Placement | null;
  readonly built: Placement | null;
  readonly plannedDistanceM: number | null;
  /** As built minus planned; null unless both are known. */
  readonly offsetM: number | null;
}

export interface SidePlacements {
  readonly side: Side;
  readonly pairs: readonly PlacementPair[];
  readonly ended: readonly Placement[];
}

function pairOf(placement: Placement): PlacementPair {
  const isPlanned = placement.state === 'planned';
  const plannedDistanceM = isPlanned ? placement.distanceM : placement.plannedDistanceM;
  return {
    key: placement.id,
    planned: isPlanned ? placement : null,
    built: isPlanned ? null : placement,
    plannedDistanceM,
    offsetM: isPlanned || plannedDistanceM === null ? null : placement.distanceM - plannedDistanceM,
  };
}

/** Placements of one span wire by side: what stands, nearest to the clamp first, and what ended, newest first. */
export function placementsBySide(placements: readonly Placement[], spanWireId: string): SidePlacements[] {
  const own = placements.filter((placement) => placement.spanWireId === spanWireId);
  return (['from', 'to'] as const).map((side) => {
    const here = own.filter((placement) => placement.side === side);
    return {
      side,
      pairs: here
        .filter((placement) => placement.endedAt === null)
        .sort((one, other) => one.distanceM - other.distanceM)
        .map(pairOf),
      ended: here
        .filter((placement) => placement.endedAt !== null)
        .sort((one, other) => (other.endedAt ?? '').localeCompare(one.endedAt ?? '')),
    };
  });
}
