import { effectScope, nextTick, shallowRef } from 'vue';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { anId } from '#src/components/drawing/a-section.ts';
import { useImportProgress } from './use-import-progress.ts';

/** The part of EventSource that the composable uses. */
class FakeEventSource {
  static opened: FakeEventSource[] = [];
  isClosed = false;
  onmessage: ((event: MessageEvent<string>) => void) | null = null;
  onerror: (() => void) | null = null;
  readonly address: string;
  constructor(address: string) {
    this.address = address;
    FakeEventSource.opened.push(this);
  }
  close(): void {
    this.isClosed = true;
  }
  send(progress: object): void {
    this.onmessage?.(new MessageEvent('message', { data: JSON.stringify(progress) }));
  }
}
const id = anId(61);
const running = { id, state: 'running', step: 'saving', doneCount: 3, totalCount: 9 };
const last = () => FakeEventSource.opened.at(-1) ?? expect.unreachable();

beforeEach(() => {
  FakeEventSource.opened = [];
  vi.stubGlobal('EventSource', FakeEventSource);
});
afterEach(() => vi.unstubAllGlobals());

describe('useImportProgress', () => {
  it('follows the import that it is given and lets go of the former one', async () => {
    const importId = shallowRef<string | null>(null);
    const scope = effectScope();
    const { progress } = scope.run(() => useImportProgress(importId, () => undefined)) ?? expect.unreachable();
    expect(FakeEventSource.opened).toEqual([]);
    importId.value = id;
    await nextTick();
    expect(last().address).toBe(`/api/v1/imports/${id}/events`);
    last().send(running);
    expect(progress.value).toEqual(running);
    importId.value = null;
    await nextTick();
    expect(last().isClosed).toBe(true);
    expect(progress.value).toBeNull();
    scope.stop();
  });

  it.each(['done', 'refused', 'failed'])('says once that it ended when it is %s', (state) => {
    const onEnded = vi.fn();
    const scope = effectScope();
    scope.run(() => useImportProgress(id, onEnded));
    last().send(running);
    expect(onEnded).not.toHaveBeenCalled();
    last().send({ ...running, state, step: 'ended' });
    expect(onEnded).toHaveBeenCalledOnce();
    expect(last().isClosed).toBe(true);
    scope.stop();
  });

  it('shows a broken connection until the next word', () => {
    const scope = effectScope();
    const { isBroken } = scope.run(() => useImportProgress(id, () => undefined)) ?? expect.unreachable();
    last().onerror?.();
    expect(isBroken.value).toBe(true);
    last().send(running);
    expect(isBroken.value).toBe(false);
    scope.stop();
  });
});
