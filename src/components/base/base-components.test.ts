import { flushPromises, mount } from '@vue/test-utils';
import { createPinia, setActivePinia } from 'pinia';
import { Quasar } from 'quasar';
import { beforeEach, describe, expect, it } from 'vitest';
import { localProblem } from '#src/api/api-problem.ts';
import { usePreferencesStore } from '#src/stores/preferences.ts';
import QuantityField from './QuantityField.vue';
import QuantityValue from './QuantityValue.vue';
import StatePanel from './StatePanel.vue';

const global = { plugins: [Quasar] as [typeof Quasar] };

beforeEach(() => {
  setActivePinia(createPinia());
  usePreferencesStore().unitSystem = 'metric';
});

describe('QuantityValue', () => {
  it('follows the units of the reader', async () => {
    const wrapper = mount(QuantityValue, { props: { value: 8.5e6, quantity: 'stress' } });
    expect(wrapper.text()).toBe('8.50\u2009MPa');
    usePreferencesStore().unitSystem = 'us';
    await flushPromises();
    expect(wrapper.text()).toBe('1.23\u2009ksi');
  });

  it('shows a dash for no value and the sign of a change', () => {
    expect(mount(QuantityValue, { props: { value: null, quantity: 'stress' } }).text()).toBe('–');
    expect(mount(QuantityValue, { props: { value: 2, quantity: 'length', isChange: true } }).text()).toBe(
      '+2.00\u2009m',
    );
  });
});

describe('QuantityField', () => {
  const field = (modelValue: number | null) =>
    mount(QuantityField, { global, props: { modelValue, quantity: 'length', label: 'Span' } });
  const lastOf = (wrapper: ReturnType<typeof field>) => wrapper.emitted('update:modelValue')?.at(-1)?.[0];

  it('reads a number in the shown unit and keeps SI', async () => {
    const wrapper = field(null);
    await wrapper.get('input').setValue('700 ft');
    await expect.poll(() => lastOf(wrapper)).toBeCloseTo(213.36, 6);
  });

  it('keeps what cannot be read, with the fault, after leaving the field', async () => {
    const wrapper = field(null);
    await wrapper.get('input').setValue('about ten');
    await flushPromises();
    await wrapper.get('input').trigger('blur');
    expect(wrapper.get('input').element.value).toBe('about ten');
    expect(wrapper.text()).toContain('write a number');
  });

  it('shows a value that comes from outside after a text that could not be read', async () => {
    const wrapper = field(null);
    await wrapper.get('input').setValue('about ten');
    await flushPromises();
    await wrapper.setProps({ modelValue: 350 });
    expect(wrapper.get('input').element.value).toBe('350');
    expect(wrapper.text()).not.toContain('write a number');
  });

  it('empties when the value is taken away', async () => {
    const wrapper = field(350);
    await wrapper.setProps({ modelValue: null });
    expect(wrapper.get('input').element.value).toBe('');
  });
});

describe('StatePanel', () => {
  it('offers another try after a failure', async () => {
    const problem = localProblem('upstream-failed', 'No connection', 'The service cannot be reached.');
    const wrapper = mount(StatePanel, { global, props: { kind: 'error', problem } });
    expect(wrapper.get('[role=alert]').text()).toContain('No connection');
    await wrapper.get('button').trigger('click');
    expect(wrapper.emitted('retry')).toHaveLength(1);
  });

  it('does not offer another try where the role is missing', () => {
    const problem = localProblem('not-allowed', 'Not allowed', 'Only engineers may do this.');
    const wrapper = mount(StatePanel, { global, props: { kind: 'error', problem } });
    expect(wrapper.text()).toContain('Only engineers may do this.');
    expect(wrapper.find('button').exists()).toBe(false);
  });
});
