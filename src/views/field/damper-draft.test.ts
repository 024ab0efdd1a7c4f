import { describe, expect, it } from 'vitest';
import { aPlacement, anId } from '#src/components/drawing/a-section.ts';
import type { SpanWireAtStructure } from './damper-draft.ts';
import { draftFaults, fieldLogInput, newDraft, offPlanM, steppedDistanceM } from './damper-draft.ts';

function aSpanWire(overrides: Partial<SpanWireAtStructure> = {}): SpanWireAtStructure {
  return {
    spanWireId: anId(41),
    spanId: anId(21),
    spanLabel: '1–2',
    sectionId: anId(1),
    otherStructureName: '2',
    spanLengthM: 350,
    side: 'from',
    wireId: anId(31),
    wireName: 'A',
    conductorName: 'Drake',
    grade: 'act',
    isStale: false,
    placements: [aPlacement()],
    ...overrides,
  };
}

function countingIds(): () => string {
  let number = 500;
  return () => anId(number++);
}

describe('newDraft', () => {
  it('takes over what was planned', () => {
    const draft = newDraft(aSpanWire(), null, countingIds());
    expect(draft).toMatchObject({ damperTypeId: anId(70), distanceM: 1.05, replacesPlacementId: anId(60) });
    expect(draft.logId).not.toBe(draft.photoFileId);
  });

  it('starts empty where nothing was planned', () => {
    const draft = newDraft(aSpanWire({ placements: [] }), null, countingIds());
    expect(draft).toMatchObject({ damperTypeId: null, distanceM: null, replacesPlacementId: null });
  });
});

describe('draftFaults', () => {
  const spanWire = aSpanWire();
  const draft = newDraft(spanWire, null, countingIds());

  it('lets a good draft through', () => {
    expect(draftFaults(draft, spanWire)).toEqual({});
  });

  it('names what is missing', () => {
    expect(Object.keys(draftFaults({ ...draft, damperTypeId: null, distanceM: null }, spanWire))).toEqual([
      'damperTypeId',
      'distanceM',
    ]);
  });

  it('refuses a distance beyond the span and one where a damper sits', () => {
    expect(draftFaults({ ...draft, distanceM: 350 }, spanWire).distanceM).toContain('longer than the span');
    const occupied = aSpanWire({ placements: [aPlacement({ id: anId(61), state: 'as-built', distanceM: 1.05 })] });
    const other = { ...draft, replacesPlacementId: null };
    expect(draftFaults(other, occupied).distanceM).toContain('already sits');
    expect(draftFaults({ ...other, replacesPlacementId: anId(61) }, occupied)).toEqual({});
  });
});

describe('fieldLogInput', () => {
  it('keeps the id made with the draft and names the photo only when there is one', () => {
    const draft = newDraft(aSpanWire(), null, countingIds());
    const at = { spanWireId: anId(41), side: 'from', fittedAt: '2026-12-01T10:00:00Z' } as const;
    expect(fieldLogInput(draft, at)).toMatchObject({ id: draft.logId, photoFileId: null });
    const photo = new File(['x'], 'damper.jpg', { type: 'image/jpeg' });
    expect(fieldLogInput({ ...draft, photo }, at)).toMatchObject({ photoFileId: draft.photoFileId });
  });
});

describe('offPlanM', () => {
  it('compares with the plan that the placement realises', () => {
    const spanWire = aSpanWire();
    const draft = newDraft(spanWire, null, countingIds());
    expect(offPlanM({ ...draft, distanceM: 1.39 }, spanWire)).toBeCloseTo(0.34, 9);
    expect(offPlanM(draft, spanWire)).toBeNull();
    expect(offPlanM({ ...draft, replacesPlacementId: null }, spanWire)).toBeNull();
  });
});

describe('steppedDistanceM', () => {
  it('steps by whole centimetres and stays above zero', () => {
    expect(steppedDistanceM(1.05, 1)).toBe(1.06);
    expect(steppedDistanceM(1.0549, -1)).toBe(1.04);
    expect(steppedDistanceM(0.01, -1)).toBe(0.01);
    expect(steppedDistanceM(null, 1)).toBe(0.01);
  });
});
