import type { AssessmentProgress } from '#shared/contract/assessments.ts';

const stepWords = {
  waiting: 'Waiting for the worker',
  'freezing-input': 'Freezing the input',
  computing: 'Computing',
  finishing: 'Putting the grades together',
  ended: 'Ended',
} as const satisfies Record<AssessmentProgress['step'], string>;

const stateWords = {
  queued: 'Queued',
  running: 'Running',
  done: 'Done',
  failed: 'Failed',
  cancelled: 'Cancelled',
} as const satisfies Record<AssessmentProgress['state'], string>;

/** State of an assessment in one word. */
export function stateWord(state: AssessmentProgress['state']): string {
  return stateWords[state];
}

/** What an assessment is doing, in one short sentence. */
export function progressSentence(progress: AssessmentProgress): string {
  const { state, step, doneCount, totalCount } = progress;
  const counts = totalCount === 0 ? '' : `${doneCount} of ${totalCount} span wires`;
  if (state === 'queued' || state === 'running') {
    return step === 'computing' && counts !== '' ? `${stepWords[step]}: ${counts}` : `${stepWords[step]}…`;
  }
  return counts === '' ? stateWords[state] : `${stateWords[state]}: ${counts}`;
}
