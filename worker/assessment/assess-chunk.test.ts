import { randomUUID } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import type { FrozenChunk, FrozenItem } from '#server/data/frozen-input.ts';
import { aBasisSpec } from '#tests/support/network.ts';
import { assessChunk } from './assess-chunk.ts';

const conductorTypeId = randomUUID();
const anItem = (more: Partial<FrozenItem> = {}): FrozenItem => ({
  spanWireId: randomUUID(),
  conductorTypeId,
  spanLengthM: 350,
  bearingDeg: 90,
  meanWireHeightM: 18,
  roughnessM: 0.05,
  tensionN: 27_757,
  fromStructureName: '1',
  toStructureName: '2',
  isAssumed: false,
  placements: [],
  ...more,
});
const aChunk = (items: FrozenItem[]): FrozenChunk => ({
  basis: { name: 'Test', versionNumber: 1, spec: aBasisSpec() },
  climate: null,
  conductors: {
    [conductorTypeId]: {
      name: '795 kcmil 26/7',
      standard: 'test',
      kind: 'ACSR',
      source: 'test',
      standing: 'closed form',
      aluminiumLayerCount: 2,
      diameterM: 0.028143,
      massKgPerM: 1.62656,
      ratedStrengthN: 138_785,
      bendingStiffnessMinNm2: 44.06,
      outerStrandDiameterM: 0.0044415,
      outerStrandModulusPa: 69e9,
    },
  },
  damperTypes: {},
  items,
});

describe('assessChunk', () => {
  it('goes on after a span wire that the engine refuses, and says why', async () => {
    const chunk = aChunk([anItem({ tensionN: 500_000 }), anItem({ isAssumed: true })]);
    const computed = await assessChunk(chunk, new AbortController().signal);
    expect(computed?.findings.map(({ outcome }) => outcome)).toEqual(['refused', 'steady']);
    expect(computed?.findings[0]).toMatchObject({
      grade: 'notice',
      stressPa: null,
      reasons: [{ code: 'refused-input' }],
    });
    expect(computed?.findings[1]?.reasons.at(-1)).toEqual({ code: 'assumed-input' });
    expect(computed?.findings[1]?.reasons[0]?.code).toBe('stress-against-limit');
  });

  it('stops when it is told to', async () => {
    const stopped = new AbortController();
    stopped.abort();
    expect(await assessChunk(aChunk([anItem()]), stopped.signal)).toBeNull();
  });
});
