import { describe, expect, it } from 'vitest';
import { aPlacement, anId } from '#src/components/drawing/a-section.ts';
import { placementsBySide } from './placement-history.ts';

describe('placementsBySide', () => {
  it('sets plan against as-built, nearest to the clamp first', () => {
    const [from, to] = placementsBySide(
      [
        aPlacement({ id: anId(61), state: 'as-built', distanceM: 1.39, plannedDistanceM: 1.05 }),
        aPlacement({ id: anId(62), distanceM: 0.9 }),
        aPlacement({ id: anId(63), side: 'to', state: 'as-built', plannedDistanceM: null }),
        aPlacement({ id: anId(64), spanWireId: anId(42) }),
      ],
      anId(41),
    );
    expect(from?.pairs.map((pair) => pair.key)).toEqual([anId(62), anId(61)]);
    expect(from?.pairs[1]?.offsetM).toBeCloseTo(0.34, 9);
    expect(from?.pairs[0]?.offsetM).toBeNull();
    expect(to?.pairs.map((pair) => [pair.plannedDistanceM, pair.offsetM])).toEqual([[null, null]]);
  });

  it('keeps what ended, newest first', () => {
    const [from] = placementsBySide(
      [
        aPlacement({ id: anId(61), endedAt: '2026-01-01T00:00:00Z' }),
        aPlacement({ id: anId(62), endedAt: '2026-06-01T00:00:00Z' }),
      ],
      anId(41),
    );
    expect(from?.pairs).toEqual([]);
    expect(from?.ended.map((placement) => placement.id)).toEqual([anId(62), anId(61)]);
  });
});
