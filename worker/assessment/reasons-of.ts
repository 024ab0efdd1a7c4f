import type { Reason } from '#shared/contract/reasons.ts';
import type { SpanWireAssessment } from '#shared/engine/index.ts';
import type { FrozenCase } from '#server/data/frozen-input.ts';
import { lifeThresholdYears } from './grade-of.ts';

/** Standard acceleration of free fall, exact by convention (published: 3rd CGPM, 1901). */
const gravityMPerS2 = 9.80665;
const sides = ['from', 'to'] as const;
const absorptionWorthNamingRatio = 0.5;
const offPlanWorthNamingM = 0.05;

interface Subject {
  readonly frozen: FrozenCase;
  readonly result: SpanWireAssessment;
}

function structureAt({ item }: FrozenCase, endIndex: number): string {
  return endIndex === 0 ? item.fromStructureName : item.toStructureName;
}

function limitReason({ frozen, result }: Subject): Reason[] {
  const { worst } = result;
  if (worst === null) return [];
  const shared = {
    structureName: structureAt(frozen, worst.endIndex),
    place: worst.place,
    limitSource: worst.limitSource,
    frequencyHz: worst.frequencyHz,
    windSpeedMPerS: worst.windSpeedMPerS,
    isOver: worst.utilisationRatio > 1,
  };
  if (worst.limitKind === 'endurance-stress') {
    return [{ code: 'stress-against-limit', ...shared, stressPa: worst.stressPa, limitPa: worst.limitStressPa }];
  }
  const limitRatio = worst.limitStressPa / frozen.conductor.outerStrandModulusPa;
  return [{ code: 'strain-against-limit', ...shared, strainRatio: worst.strainRatio, limitRatio }];
}

function bandReason({ result }: Subject): Reason[] {
  const band = result.exceedance;
  if (band === null) return [];
  return [
    {
      code: 'band-over-limit',
      windLowerMPerS: band.windLowerMPerS,
      windUpperMPerS: band.windUpperMPerS,
      frequencyLowerHz: band.frequencyLowerHz,
      frequencyUpperHz: band.frequencyUpperHz,
    },
  ];
}

function damperReasons({ frozen, result }: Subject): Reason[] {
  const { item, conductor } = frozen;
  const isHigh = result.worst !== null && result.worst.utilisationRatio > frozen.basis.spec.thresholds.noticeFromRatio;
  return sides.flatMap((side, endIndex): Reason[] => {
    const structureName = structureAt(frozen, endIndex);
    const dampers = item.placements.filter((placement) => placement.side === side);
    const reasons: Reason[] = dampers.flatMap(({ distanceM, plannedDistanceM }): Reason[] => {
      const offsetM = plannedDistanceM === null ? 0 : distanceM - plannedDistanceM;
      if (plannedDistanceM === null || Math.abs(offsetM) < offPlanWorthNamingM) return [];
      return [{ code: 'damper-off-plan', structureName, distanceM, plannedDistanceM, offsetM }];
    });
    if (!isHigh || result.worst === null) return reasons;
    const absorbedRatio = result.endAbsorbedRatioAtWorst[endIndex] ?? 0;
    if (dampers.length === 0) {
      const hOverWM = item.tensionN / (conductor.massKgPerM * gravityMPerS2);
      reasons.push({
        code: 'no-damper',
        structureName,
        tensionRatedRatio: item.tensionN / conductor.ratedStrengthN,
        hOverWM,
      });
    } else if (absorbedRatio < absorptionWorthNamingRatio) {
      reasons.push({
        code: 'weak-absorption',
        structureName,
        absorbedRatio,
        frequencyHz: result.worst.frequencyHz,
        dampersCount: dampers.length,
      });
    }
    return reasons;
  });
}

function lifeReason({ frozen, result }: Subject): Reason[] {
  if (result.life.outcome !== 'finite') return [];
  const lifeYears = result.life.years;
  return [{ code: 'life', lifeYears, thresholdYears: lifeThresholdYears(lifeYears, frozen.basis.spec) }];
}

/** Band that every damper table of the span wire covers. */
function coveredBandHz({ item, damperTypes }: FrozenCase): { frequencyLowerHz: number; frequencyUpperHz: number } {
  const tables = item.placements.flatMap(({ damperTypeId }) => {
    const model = damperTypes[damperTypeId]?.model;
    return model?.kind === 'table' ? [model.rows.map(({ frequencyHz }) => frequencyHz)] : [];
  });
  return {
    frequencyLowerHz: Math.max(...tables.map((frequencies) => Math.min(...frequencies))),
    frequencyUpperHz: Math.min(...tables.map((frequencies) => Math.max(...frequencies))),
  };
}

function outcomeReason({ frozen, result }: Subject): Reason[] {
  const { worst } = result;
  if (result.outcome === 'quiet') return [{ code: 'quiet' }];
  if (result.outcome === 'amplitude-limit' && worst !== null) {
    return [{ code: 'amplitude-limit', frequencyHz: worst.frequencyHz, windSpeedMPerS: worst.windSpeedMPerS }];
  }
  return result.outcome === 'no-damper-data' ? [{ code: 'no-damper-data', ...coveredBandHz(frozen) }] : [];
}

/** Why a finding has its grade, the leading reason first. */
export function reasonsOf(frozen: FrozenCase, result: SpanWireAssessment): Reason[] {
  const subject = { frozen, result };
  const assumed: Reason[] = frozen.item.isAssumed ? [{ code: 'assumed-input' }] : [];
  return [
    ...limitReason(subject),
    ...bandReason(subject),
    ...damperReasons(subject),
    ...outcomeReason(subject),
    ...lifeReason(subject),
    ...assumed,
  ];
}
