import { mount } from '@vue/test-utils';
import { Quasar } from 'quasar';
import { describe, expect, it } from 'vitest';
import SeriesChart from './SeriesChart.vue';
import { aChart } from './a-chart.ts';

const mounted = (model = aChart()) =>
  mount(SeriesChart, {
    props: { model, emptyReason: 'The wire is quiet here.' },
    global: { plugins: [Quasar] },
  });

describe('SeriesChart', () => {
  it('opens its numbers as a table', async () => {
    const chart = mounted();
    expect(chart.find('table').exists()).toBe(false);
    const details = chart.get<HTMLDetailsElement>('details');
    details.element.open = true;
    await details.trigger('toggle');
    expect(chart.findAll('tbody tr')).toHaveLength(3);
    expect(chart.get('thead').text()).toContain('Structure 1, clamp, MPa');
  });

  it('offers picture and numbers', () => {
    expect(mounted().text()).toContain('Save PNG');
    expect(mounted().text()).toContain('Save CSV');
  });

  it('says why it is empty, and then offers nothing to save', () => {
    const chart = mounted(aChart({ series: [] }));
    expect(chart.text()).toContain('The wire is quiet here.');
    expect(chart.text()).not.toContain('Save');
  });
});
