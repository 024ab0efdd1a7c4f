import { gradeRankIndex, type Grade } from '#shared/contract/grades.ts';
import type { BasisSpec } from '#shared/contract/bases.ts';
import type { SpanWireAssessment } from '#shared/engine/index.ts';

function worse(a: Grade, b: Grade): Grade {
  return gradeRankIndex(a) >= gradeRankIndex(b) ? a : b;
}

function gradeByRatio(utilisationRatio: number, { thresholds }: BasisSpec): Grade {
  if (utilisationRatio >= thresholds.urgentFromRatio) return 'urgent';
  if (utilisationRatio >= thresholds.actFromRatio) return 'act';
  return utilisationRatio >= thresholds.noticeFromRatio ? 'notice' : 'calm';
}

function gradeByLife(life: SpanWireAssessment['life'], { thresholds }: BasisSpec): Grade {
  if (life.outcome !== 'finite') return 'calm';
  if (life.years < thresholds.urgentBelowYears) return 'urgent';
  if (life.years < thresholds.actBelowYears) return 'act';
  return life.years < thresholds.noticeBelowYears ? 'notice' : 'calm';
}

/** Grade by limits; where a damper has no data or the amplitude passes what the method covers, never better than that warrants. */
function gradeByLimit(result: SpanWireAssessment, spec: BasisSpec): Grade {
  const byRatio = result.worst === null ? 'calm' : gradeByRatio(result.worst.utilisationRatio, spec);
  if (result.outcome === 'amplitude-limit') return worse(byRatio, 'act');
  // A row that could not be computed is not a calm one: somebody has to look.
  return result.outcome === 'no-damper-data' ? worse(byRatio, 'notice') : byRatio;
}

/** Grade of a result under a basis: by its limits, by fatigue life, or by the worse of both. */
export function gradeOf(result: SpanWireAssessment, spec: BasisSpec): Grade {
  const byLimit = gradeByLimit(result, spec);
  const byLife = gradeByLife(result.life, spec);
  if (spec.governs === 'limit') return byLimit;
  return spec.governs === 'life' && result.life.outcome !== 'no-climate' ? byLife : worse(byLimit, byLife);
}

/** The threshold of years that a life falls below, or null. */
export function lifeThresholdYears(years: number, { thresholds }: BasisSpec): number | null {
  const steps = [thresholds.urgentBelowYears, thresholds.actBelowYears, thresholds.noticeBelowYears];
  return steps.find((threshold) => years < threshold) ?? null;
}
