import type { Placement } from '#shared/contract/placements.ts';

export interface DamperPlace {
  readonly id: string;
  readonly x: number;
  readonly isAsBuilt: boolean;
}

const firstOffset = 16;
const nextOffset = 20;

/**
 * Places of damper symbols along a span in an overview: at their true side and in their order from the clamp, but not to
 * scale, because a metre of a span is less than the width of a line there.
 */
export function damperPlaces(
  placements: readonly Placement[],
  span: { readonly fromX: number; readonly toX: number },
): DamperPlace[] {
  const standing = placements.filter((placement) => placement.endedAt === null);
  const half = Math.max(firstOffset, (span.toX - span.fromX) / 2 - firstOffset);
  return (['from', 'to'] as const).flatMap((side) =>
    standing
      .filter((placement) => placement.side === side)
      .sort((one, other) => one.distanceM - other.distanceM)
      .map((placement, index) => {
        const offset = Math.min(half, firstOffset + index * nextOffset);
        return {
          id: placement.id,
          x: side === 'from' ? span.fromX + offset : span.toX - offset,
          isAsBuilt: placement.state === 'as-built',
        };
      }),
  );
}
