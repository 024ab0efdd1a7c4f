import { mount } from '@vue/test-utils';
import { createPinia } from 'pinia';
import { Quasar } from 'quasar';
import { describe, expect, it } from 'vitest';
import { createMemoryHistory, createRouter } from 'vue-router';
import type { Alert } from '#shared/contract/alerts.ts';
import { anId } from '#src/components/drawing/a-section.ts';
import AlertItem from './AlertItem.vue';

const openAlert: Alert = {
  id: anId(900),
  state: 'open',
  grade: 'urgent',
  spanWireId: anId(41),
  spanId: anId(21),
  sectionId: anId(1),
  findingId: anId(51),
  lineName: 'Harbour A',
  spanLabel: '14–15',
  wireName: 'A',
  leadingReason: { code: 'quiet' },
  openedAt: '2026-11-30T10:00:00Z',
  acknowledgedAt: null,
  acknowledgedByName: null,
  closedAt: null,
  closedByName: null,
  note: '',
  deliveries: [
    {
      recipientName: 'Marta',
      state: 'failed',
      sentAt: null,
      isDigest: false,
      attemptCount: 8,
      failureDetail: 'mailbox unknown',
    },
  ],
  versionNumber: 1,
};

function mounted(alert: Partial<Alert> = {}, canAct = true) {
  const router = createRouter({
    history: createMemoryHistory(),
    routes: [{ path: '/:rest(.*)*', component: { template: '<div />' } }],
  });
  return mount(AlertItem, {
    props: { alert: { ...openAlert, ...alert }, canAct, isBusy: false },
    global: { plugins: [createPinia(), Quasar, router] },
  });
}

const actsOf = (item: ReturnType<typeof mounted>) => item.findAll('button').map((button) => button.text());

describe('AlertItem', () => {
  it('lets the safety officer acknowledge with a note', async () => {
    const item = mounted();
    await item.get('textarea').setValue('Crew sent.');
    await item.findAll('button')[0]?.trigger('click');
    expect(item.emitted('act')).toEqual([[{ alertId: anId(900), act: 'acknowledge', note: 'Crew sent.' }]]);
  });

  it('offers only what the state allows, and nothing to other roles', () => {
    expect(actsOf(mounted())).toEqual(['Acknowledge', 'Close alert']);
    expect(actsOf(mounted({ state: 'acknowledged' }))).toEqual(['Close alert']);
    expect(actsOf(mounted({ state: 'closed' }))).toEqual([]);
    expect(actsOf(mounted({}, false))).toEqual([]);
  });

  it('opens the span and says why an e-mail did not go out', () => {
    const item = mounted();
    expect(item.get('a').attributes('href')).toBe(`/sections/${anId(1)}?span=${anId(21)}&wire=${anId(41)}`);
    expect(item.text()).toContain('E-mail: 0 of 1 sent, 1 failed');
    expect(item.text()).toContain('failed after 8 attempts: mailbox unknown');
  });
});
