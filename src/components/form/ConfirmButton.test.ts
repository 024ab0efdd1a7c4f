import { mount } from '@vue/test-utils';
import { Quasar } from 'quasar';
import { describe, expect, it } from 'vitest';
import ConfirmButton from './ConfirmButton.vue';

const mounted = () =>
  mount(ConfirmButton, {
    props: { label: 'Withdraw', question: 'Withdraw this plan?', confirmLabel: 'Yes, withdraw' },
    attachTo: document.body,
    global: { plugins: [Quasar] },
  });

describe('ConfirmButton', () => {
  it('asks before it acts', async () => {
    const button = mounted();
    await button.get('button').trigger('click');
    expect(button.emitted('confirm')).toBeUndefined();
    expect(button.text()).toContain('Withdraw this plan?');
    await button.findAll('button')[0]?.trigger('click');
    expect(button.emitted('confirm')).toHaveLength(1);
  });

  it('goes back on No', async () => {
    const button = mounted();
    await button.get('button').trigger('click');
    await button.findAll('button')[1]?.trigger('click');
    expect(button.emitted('confirm')).toBeUndefined();
    expect(button.text()).toBe('Withdraw');
  });
});
