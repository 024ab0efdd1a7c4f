import { QueryClient, VueQueryPlugin } from '@tanstack/vue-query';
import { flushPromises, mount } from '@vue/test-utils';
import { createPinia } from 'pinia';
import { Quasar } from 'quasar';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { createMemoryHistory, createRouter } from 'vue-router';
import AssumptionsForm from './AssumptionsForm.vue';
import FormerImports from './FormerImports.vue';
import ImportOutcome from './ImportOutcome.vue';
import { anImportRun } from './an-import-run.ts';
import { freshDraft } from './import-draft.ts';

function global() {
  const router = createRouter({
    history: createMemoryHistory(),
    routes: [{ path: '/:rest(.*)*', component: { template: '<div />' } }],
  });
  const query: [typeof VueQueryPlugin, object] = [
    VueQueryPlugin,
    { queryClient: new QueryClient({ defaultOptions: { queries: { retry: false } } }) },
  ];
  return { plugins: [createPinia(), Quasar, router, query] };
}
const page = (items: readonly unknown[]) => () =>
  Promise.resolve(Response.json({ items, nextCursor: null, totalCount: items.length }));

afterEach(() => vi.unstubAllGlobals());

describe('ImportOutcome', () => {
  it('counts what came in and leads to it on the map', () => {
    const outcome = mount(ImportOutcome, { props: { run: anImportRun() }, global: global() });
    expect(outcome.text()).toContain('lines.csv is in');
    expect(outcome.text()).toContain('5 spans, 20 span wires');
    const address = new URL(outcome.get('a').attributes('href') ?? '', 'http://map');
    expect(Number(address.searchParams.get('lat'))).toBeCloseTo(-38.5);
    expect(Number(address.searchParams.get('lng'))).toBeCloseTo(-21.1);
  });

  it('does not say that a check was an import', () => {
    const run = anImportRun({ options: { kind: 'surveyed', format: 'csv', isDryRun: true } });
    const outcome = mount(ImportOutcome, { props: { run }, global: global() });
    expect(outcome.text()).toContain('lines.csv can be imported');
    expect(outcome.find('a').exists()).toBe(false);
  });

  it('names every bad row with its field, value and reason', () => {
    const error = { row: 7, field: 'tension_n', value: '-5', message: 'must be above 0' };
    const run = anImportRun({ state: 'refused', counts: null, extentDeg: null, errors: [error], errorCount: 1 });
    const outcome = mount(ImportOutcome, { props: { run }, global: global() });
    expect(outcome.text()).toContain('was refused; nothing was saved');
    expect(outcome.findAll('tbody td').map((cell) => cell.text())).toEqual(['7', 'tension_n', '-5', 'must be above 0']);
  });

  it('says when there are more errors than are listed', () => {
    const error = { row: 7, field: null, value: null, message: 'wrong' };
    const run = anImportRun({ state: 'refused', errors: [error], errorCount: 812 });
    expect(mount(ImportOutcome, { props: { run }, global: global() }).text()).toContain(
      '812 errors, the first 1 shown',
    );
  });
});

describe('FormerImports', () => {
  it('tells a check from an import and opens one', async () => {
    const check = anImportRun({ options: { kind: 'centre-line', format: 'csv', isDryRun: true } });
    vi.stubGlobal('fetch', page([anImportRun(), check]));
    const former = mount(FormerImports, { global: global() });
    await flushPromises();
    const [imported, checked] = former.findAll('tbody tr').map((row) => row.text());
    expect(imported).toContain('imported');
    expect(checked).toContain('checked, nothing saved');
    await former.get('tbody button').trigger('click');
    expect(former.emitted('open')).toEqual([[anImportRun().id]]);
  });

  it('says what to do when there is none, and offers to try again when it failed', async () => {
    vi.stubGlobal('fetch', page([]));
    const empty = mount(FormerImports, { global: global() });
    await flushPromises();
    expect(empty.text()).toContain('try one of the samples');
    vi.stubGlobal('fetch', () => Promise.reject(new TypeError('no network')));
    const failed = mount(FormerImports, { global: global() });
    await flushPromises();
    expect(failed.get('[role=alert]').text()).toContain('Try again');
  });
});

describe('AssumptionsForm', () => {
  it('says beside the field what is wrong', () => {
    vi.stubGlobal('fetch', page([]));
    const form = mount(AssumptionsForm, {
      props: { modelValue: freshDraft(), faults: { 'voltageClasses.0.conductorName': 'Choose a conductor.' } },
      global: global(),
    });
    const wrong = form.findAll('.q-field--error');
    expect(wrong).toHaveLength(1);
    expect(wrong[0]?.text()).toContain('Choose a conductor.');
  });
});
