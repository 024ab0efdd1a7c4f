import { mount } from '@vue/test-utils';
import { createPinia } from 'pinia';
import { Quasar } from 'quasar';
import { describe, expect, it } from 'vitest';
import { createMemoryHistory, createRouter } from 'vue-router';
import RiskTable from './RiskTable.vue';
import { aRiskRow } from './a-risk-row.ts';
import { firstRiskFilter } from './risk-filter.ts';

function mounted(rows = [aRiskRow()]) {
  const router = createRouter({
    history: createMemoryHistory(),
    routes: [{ path: '/:rest(.*)*', component: { template: '<div />' } }],
  });
  return mount(RiskTable, {
    props: { rows, filter: firstRiskFilter, isBusy: false },
    global: { plugins: [createPinia(), Quasar, router] },
  });
}

describe('RiskTable', () => {
  it('links each row to its span and wire on the section page', () => {
    const row = aRiskRow();
    expect(mounted().get('tbody a').attributes('href')).toBe(
      `/sections/${row.sectionId}?span=${row.spanId}&wire=${row.spanWireId}`,
    );
  });

  it('says the leading reason as a sentence and shows numbers in the units of the reader', () => {
    const text = mounted().get('tbody').text();
    expect(text).toContain('Bending stress at the clamp of structure 14 reaches');
    expect(text).toContain('31.0\u2009MPa');
    expect(text).not.toMatch(/NaN|undefined|null/);
  });

  it('marks what is assumed, stale or not assessed', () => {
    const text = mounted([
      aRiskRow({ isAssumed: true, isStale: true }),
      aRiskRow({ grade: null, leadingReason: null, stressPa: null, assessedAt: null }),
    ]).text();
    expect(text).toContain('assumed');
    expect(text).toContain('stale');
    expect(text).toContain('Not assessed yet.');
  });

  it('tells which column it is sorted by and asks for another', async () => {
    const table = mounted();
    expect(table.findAll('th[aria-sort="descending"]').map((head) => head.text())).toEqual(['Grade ↓']);
    await table
      .findAll('th button')
      .find((button) => button.text() === 'Life')
      ?.trigger('click');
    expect(table.emitted('sort')).toEqual([['life']]);
  });
});
