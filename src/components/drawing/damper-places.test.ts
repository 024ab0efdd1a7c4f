import { describe, expect, it } from 'vitest';
import { aPlacement, anId } from './a-section.ts';
import { damperPlaces } from './damper-places.ts';

const span = { fromX: 100, toX: 300 };

describe('damperPlaces', () => {
  it('puts each damper at its side, nearest to the clamp first', () => {
    const places = damperPlaces(
      [
        aPlacement({ id: anId(1), distanceM: 2 }),
        aPlacement({ id: anId(2), distanceM: 1, state: 'as-built' }),
        aPlacement({ id: anId(3), side: 'to' }),
      ],
      span,
    );
    expect(places.map((place) => [place.id, place.isAsBuilt])).toEqual([
      [anId(2), true],
      [anId(1), false],
      [anId(3), false],
    ]);
    expect(places[0]?.x).toBeLessThan(places[1]?.x ?? 0);
    expect(places[2]?.x).toBeGreaterThan(200);
  });

  it('leaves out what no longer stands', () => {
    expect(damperPlaces([aPlacement({ endedAt: '2026-11-02T08:00:00Z' })], span)).toEqual([]);
  });
});
