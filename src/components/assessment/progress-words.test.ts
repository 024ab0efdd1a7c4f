import { describe, expect, it } from 'vitest';
import type { AssessmentProgress } from '#shared/contract/assessments.ts';
import { progressSentence } from './progress-words.ts';

const progress: AssessmentProgress = {
  id: '0198d3c2-7a50-7000-8000-000000000001',
  state: 'running',
  step: 'computing',
  doneCount: 30,
  totalCount: 150,
};

describe('progressSentence', () => {
  it('counts while it computes', () => {
    expect(progressSentence(progress)).toBe('Computing: 30 of 150 span wires');
  });

  it('does not count before the input is frozen', () => {
    expect(progressSentence({ ...progress, state: 'queued', step: 'waiting', doneCount: 0, totalCount: 0 })).toBe(
      'Waiting for the worker…',
    );
    expect(progressSentence({ ...progress, step: 'freezing-input', totalCount: 0 })).toBe('Freezing the input…');
  });

  it('says how it ended and how far it came', () => {
    expect(progressSentence({ ...progress, state: 'cancelled', step: 'ended' })).toBe(
      'Cancelled: 30 of 150 span wires',
    );
  });
});
