import type { FindingSummary } from '#shared/contract/findings.ts';
import type { Grade } from '#shared/contract/grades.ts';
import { gradeRankIndex } from '#shared/contract/grades.ts';

/** What a finding changed against the one before it. */
export interface FindingChange {
  readonly grade: 'first' | 'unknown' | 'same' | 'better' | 'worse';
  readonly formerGrade: Grade | null;
  /** Newer minus former clamp stress; null when one of them has none. */
  readonly stressPa: number | null;
}

/**
 * Changes of findings that are sorted newest first.
 *
 * @param hasOlder whether older ones exist that are not in the list: the change of the last one is then unknown
 */
export function findingChanges(findings: readonly FindingSummary[], hasOlder: boolean): FindingChange[] {
  return findings.map((finding, index) => {
    const former = findings[index + 1];
    if (former === undefined) return { grade: hasOlder ? 'unknown' : 'first', formerGrade: null, stressPa: null };
    const step = gradeRankIndex(finding.grade) - gradeRankIndex(former.grade);
    const hasBoth = finding.stressPa !== null && former.stressPa !== null;
    return {
      grade: step === 0 ? 'same' : step < 0 ? 'better' : 'worse',
      formerGrade: former.grade,
      stressPa: hasBoth ? (finding.stressPa ?? 0) - (former.stressPa ?? 0) : null,
    };
  });
}
