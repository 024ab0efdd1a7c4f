import { describe, expect, it } from 'vitest';
import type { FindingSummary } from '#shared/contract/findings.ts';
import type { FieldLog } from '#shared/contract/placements.ts';
import { aPlacement, anId } from '#src/components/drawing/a-section.ts';
import { logOutcome } from './log-outcome.ts';

const log: FieldLog = {
  id: anId(900),
  placement: aPlacement({ state: 'as-built' }),
  assessmentId: anId(900),
  gradeBefore: 'urgent',
  loggedAt: '2026-12-01T10:00:00Z',
  spanLabel: '1–2',
  lineName: 'Harbour A',
  sectionId: anId(1),
  wireName: 'A',
};

function aFinding(number: number, assessmentId: string): FindingSummary {
  return {
    id: anId(number),
    assessmentId,
    spanWireId: anId(41),
    outcome: 'steady',
    grade: 'notice',
    utilisationRatio: 0.9,
    stressPa: 20e6,
    limitStressPa: 22e6,
    frequencyHz: 20,
    windSpeedMPerS: 3,
    amplitudeM: 0.002,
    lifeYears: null,
    reasons: [],
    assessedAt: '2026-12-01T10:01:00Z',
  };
}

describe('logOutcome', () => {
  it('takes the newest finding as the former one until the re-assessment has made its own', () => {
    expect(logOutcome(log, [aFinding(1, anId(800))])).toMatchObject({ former: { id: anId(1) }, now: null });
    expect(logOutcome(log, [])).toEqual({ former: null, now: null });
  });

  it('sets the new one beside the former one', () => {
    const outcome = logOutcome(log, [aFinding(2, anId(900)), aFinding(1, anId(800))]);
    expect(outcome).toMatchObject({ former: { id: anId(1) }, now: { id: anId(2) } });
  });
});
