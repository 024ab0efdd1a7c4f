import { QueryClient, VueQueryPlugin } from '@tanstack/vue-query';
import { flushPromises, mount } from '@vue/test-utils';
import { createPinia } from 'pinia';
import { Quasar } from 'quasar';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { createMemoryHistory, createRouter } from 'vue-router';
import { anId } from '#src/components/drawing/a-section.ts';
import MapLegend from './MapLegend.vue';
import SelectionTray from './SelectionTray.vue';
import SpanListPanel from './SpanListPanel.vue';
import { aSpanItem } from './a-span-item.ts';

function global() {
  const router = createRouter({
    history: createMemoryHistory(),
    routes: [{ path: '/:rest(.*)*', component: { template: '<div />' } }],
  });
  const query: [typeof VueQueryPlugin, object] = [VueQueryPlugin, { queryClient: new QueryClient() }];
  return { plugins: [createPinia(), Quasar, router, query] };
}
const page = (items: readonly unknown[], totalCount: number) => () =>
  Promise.resolve(Response.json({ items, nextCursor: null, totalCount }));
const picked = { spanCount: 2, spanWireCount: 8, lengthM: 700, worst: 'act', isAssumed: true } as const;

afterEach(() => vi.unstubAllGlobals());

describe('MapLegend', () => {
  it('adds a grade to the filter and takes it out again', async () => {
    const legend = mount(MapLegend, { props: { shown: ['act'] }, global: global() });
    const [urgent, act] = legend.findAll('input');
    await urgent?.trigger('change');
    await act?.trigger('change');
    expect(legend.emitted('change')).toEqual([[['act', 'urgent']], [[]]]);
  });
});

describe('SpanListPanel', () => {
  const props = { search: '', grades: [], picked: new Set([anId(21)]), canAssess: true };

  it('lists spans with their state, ticks the picked ones, and shows one on the map', async () => {
    vi.stubGlobal('fetch', page([aSpanItem({ isAssumed: true }), aSpanItem({ id: anId(22), label: '15–16' })], 90));
    const panel = mount(SpanListPanel, { props, global: global() });
    await flushPromises();
    expect(
      panel.findAll('li input').map((box) => box.element instanceof HTMLInputElement && box.element.checked),
    ).toEqual([true, false]);
    expect(panel.get('li').text()).toContain('assumed');
    expect(panel.text()).toContain('and 88 more');
    await panel.get('[aria-label="Show span 15–16 on the map"]').trigger('click');
    expect(panel.emitted('show')?.[0]).toMatchObject([{ label: '15–16' }]);
  });

  it('offers all that was found, or the whole network without a filter', async () => {
    vi.stubGlobal('fetch', page([aSpanItem()], 90));
    const panel = mount(SpanListPanel, { props, global: global() });
    await flushPromises();
    await panel.get('.foot button').trigger('click');
    expect(panel.emitted('whole-network')).toHaveLength(1);
    await panel.setProps({ search: 'Harbour' });
    await flushPromises();
    expect(panel.get('.foot button').text()).toBe('Pick all 90 found');
    await panel.get('.foot button').trigger('click');
    expect(panel.emitted('pick-all')).toHaveLength(1);
  });

  it('says why it is empty', async () => {
    vi.stubGlobal('fetch', page([], 0));
    const panel = mount(SpanListPanel, { props: { ...props, search: 'nowhere' }, global: global() });
    await flushPromises();
    expect(panel.text()).toContain('Change the text or the grades.');
  });
});

describe('SelectionTray', () => {
  const props = { totals: picked, spanIds: [anId(21), anId(22)], sectionId: anId(1), canAssess: true };

  it('adds up, marks what is assumed, and opens the section', () => {
    vi.stubGlobal('fetch', page([], 0));
    const text = mount(SelectionTray, { props, global: global() });
    expect(text.text()).toContain('2 spans picked');
    expect(text.text()).toContain('8 span wires');
    expect(text.text()).toContain('assumed');
    expect(text.get('a').attributes('href')).toBe(`/sections/${anId(1)}`);
  });

  it.each([
    [[anId(21)], { kind: 'spans', spanIds: [anId(21)] }],
    [null, { kind: 'whole-network' }],
  ])('assesses what is picked: %o', async (spanIds, selection) => {
    const sent: RequestInit[] = [];
    vi.stubGlobal('fetch', (_address: string, init: RequestInit) => {
      if (init.method === 'POST') sent.push(init);
      return page([], 0)();
    });
    const tray = mount(SelectionTray, { props: { ...props, spanIds }, global: global() });
    await tray
      .findAll('button')
      .find((button) => button.text() === 'Assess')
      ?.trigger('click');
    await flushPromises();
    const [request] = sent;
    const body: unknown = JSON.parse(String(request?.body));
    expect(body).toMatchObject({ selection });
    expect(new Headers(request?.headers).get('idempotency-key')).toMatch(/^[0-9a-f-]{36}$/);
  });

  it('does not offer an assessment to those who may not ask for it', () => {
    vi.stubGlobal('fetch', page([], 0));
    const tray = mount(SelectionTray, { props: { ...props, canAssess: false }, global: global() });
    expect(tray.text()).not.toContain('Assess');
  });
});
