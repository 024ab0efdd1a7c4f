import { QueryClient, VueQueryPlugin } from '@tanstack/vue-query';
import { flushPromises, mount } from '@vue/test-utils';
import { createPinia, setActivePinia } from 'pinia';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { defineComponent } from 'vue';
import type { SpanListItem } from '#shared/contract/lines.ts';
import { anId } from '#src/components/drawing/a-section.ts';
import { useSelectionStore } from '#src/stores/selection.ts';
import { aSpanItem } from './a-span-item.ts';
import { usePickedSpans } from './use-picked-spans.ts';

const first = aSpanItem({ id: anId(21), grade: 'calm', spanLengthM: 300 });
const second = aSpanItem({ id: anId(22), grade: 'urgent', spanLengthM: 200, isAssumed: true });

/** Answers of the service, one a request; the addresses asked for are kept. */
function serve(...pages: readonly { items: SpanListItem[]; nextCursor?: string }[]): string[] {
  const asked: string[] = [];
  vi.stubGlobal('fetch', (address: string) => {
    const page = pages[asked.length] ?? { items: [] };
    asked.push(address);
    return Promise.resolve(
      Response.json({ items: page.items, nextCursor: page.nextCursor ?? null, totalCount: page.items.length }),
    );
  });
  return asked;
}

function run(): ReturnType<typeof usePickedSpans> {
  const made: ReturnType<typeof usePickedSpans>[] = [];
  const Host = defineComponent({
    setup: () => {
      made.push(usePickedSpans());
      return () => null;
    },
  });
  mount(Host, { global: { plugins: [[VueQueryPlugin, { queryClient: new QueryClient() }]] } });
  return made[0] ?? expect.unreachable();
}

beforeEach(() => setActivePinia(createPinia()));
afterEach(() => vi.unstubAllGlobals());

describe('usePickedSpans', () => {
  it('picks every span of a section over all pages, and adds them up', async () => {
    const asked = serve({ items: [first], nextCursor: 'next' }, { items: [second] });
    const { addSection, totals, sectionIds } = run();
    await addSection(anId(1));
    expect(asked).toHaveLength(2);
    expect(asked[1]).toContain('cursor=next');
    expect(totals.value).toEqual({ spanCount: 2, spanWireCount: 8, lengthM: 500, worst: 'urgent', isAssumed: true });
    expect([...sectionIds.value]).toEqual([anId(1)]);
  });

  it('picks in a box only what the filter shows', async () => {
    const asked = serve({ items: [second] });
    await run().addBox('-22,-39,-20,-38', ['urgent', 'act']);
    expect(new URL(asked[0] ?? '', 'http://map').searchParams.get('grades')).toBe('urgent,act');
    expect(useSelectionStore().spanIds).toEqual([second.id]);
  });

  it('asks for the facts of a span that was picked by its id', async () => {
    const asked = serve({ items: [first] });
    const { totals } = run();
    useSelectionStore().toggle(first.id);
    await flushPromises();
    expect(asked[0]).toContain(`spanIds=${first.id}`);
    expect(totals.value.lengthM).toBe(300);
  });

  it('adds nothing and says so when there are more than one assessment takes', async () => {
    const many = Array.from({ length: 20_001 }, (_none, index) => aSpanItem({ id: anId(100_000 + index) }));
    serve({ items: many });
    const { addMatching, problem } = run();
    await addMatching('', []);
    expect(useSelectionStore().count).toBe(0);
    expect(problem.value?.message).toContain('at most 20000 spans');
  });

  it('keeps what was picked when the service fails', async () => {
    serve({ items: [first] });
    const { addSection, problem } = run();
    await addSection(anId(1));
    vi.stubGlobal('fetch', () => Promise.reject(new TypeError('no network')));
    await addSection(anId(2));
    expect(problem.value).not.toBeNull();
    expect(useSelectionStore().spanIds).toEqual([first.id]);
  });
});
