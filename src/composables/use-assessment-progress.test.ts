import { effectScope, nextTick, shallowRef } from 'vue';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { AssessmentProgress } from '#shared/contract/assessments.ts';
import { useAssessmentProgress } from './use-assessment-progress.ts';

/** The part of EventSource that the composable uses. */
class FakeEventSource extends EventTarget {
  static opened: FakeEventSource[] = [];
  isClosed = false;
  readonly address: string;
  constructor(address: string) {
    super();
    this.address = address;
    FakeEventSource.opened.push(this);
  }
  close(): void {
    this.isClosed = true;
  }
  send(progress: AssessmentProgress): void {
    this.dispatchEvent(new MessageEvent('message', { data: JSON.stringify(progress) }));
  }
}

const id = '0198d3c2-7a50-7000-8000-000000000001';
const running: AssessmentProgress = { id, state: 'running', step: 'computing', doneCount: 3, totalCount: 15 };

function lastSource(): FakeEventSource {
  const source = FakeEventSource.opened.at(-1);
  if (source === undefined) throw new Error('nothing was opened');
  return source;
}

beforeEach(() => {
  FakeEventSource.opened = [];
  vi.stubGlobal('EventSource', FakeEventSource);
});
afterEach(() => vi.unstubAllGlobals());

describe('useAssessmentProgress', () => {
  it('follows nobody without an id and opens the stream of the one it is given', async () => {
    const assessmentId = shallowRef<string | null>(null);
    const scope = effectScope();
    const { progress } = scope.run(() => useAssessmentProgress(assessmentId)) ?? expect.unreachable();
    expect(FakeEventSource.opened).toEqual([]);
    assessmentId.value = id;
    await nextTick();
    expect(lastSource().address).toBe(`/api/v1/assessments/${id}/events`);
    lastSource().send(running);
    expect(progress.value).toEqual(running);
    scope.stop();
    expect(lastSource().isClosed).toBe(true);
  });

  it('says that it ended once and does not let the browser come back', () => {
    const onEnded = vi.fn();
    const scope = effectScope();
    scope.run(() => useAssessmentProgress(id, onEnded));
    lastSource().send(running);
    expect(onEnded).not.toHaveBeenCalled();
    lastSource().send({ ...running, state: 'done', step: 'ended', doneCount: 15 });
    expect(onEnded).toHaveBeenCalledOnce();
    expect(lastSource().isClosed).toBe(true);
    scope.stop();
  });

  it('shows a broken connection until the next word', () => {
    const scope = effectScope();
    const { isBroken } = scope.run(() => useAssessmentProgress(id)) ?? expect.unreachable();
    lastSource().dispatchEvent(new Event('error'));
    expect(isBroken.value).toBe(true);
    lastSource().send(running);
    expect(isBroken.value).toBe(false);
    scope.stop();
  });
});
