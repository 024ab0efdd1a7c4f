import type { Assessment } from '#shared/contract/assessments.ts';

/** Name of an assessment for people: its title, or what started it. */
export function assessmentTitle(assessment: Pick<Assessment, 'title' | 'cause'>): string {
  if (assessment.title !== '') return assessment.title;
  return assessment.cause === 'field-log' ? 'After a field log' : 'Assessment';
}
