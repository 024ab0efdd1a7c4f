import { mount } from '@vue/test-utils';
import { describe, expect, it } from 'vitest';
import SectionDrawing from './SectionDrawing.vue';
import { aPlacement, aSection, anId } from './a-section.ts';

const choice = { spanId: anId(21), wireId: anId(31) };

function mounted(section = aSection()) {
  return mount(SectionDrawing, {
    props: { section, choice, heightText: (heightM: number) => `${heightM} m` },
    attachTo: document.body,
  });
}

describe('SectionDrawing', () => {
  it('states the exaggeration of heights', () => {
    expect(mounted().text()).toMatch(/heights ×\d/);
  });

  it('names every span wire with its grade and whether it is stale', () => {
    const names = mounted()
      .findAll('[role="gridcell"]')
      .map((cell) => cell.attributes('aria-label'));
    expect(names).toEqual([
      'Span 1–2, wire A: urgent',
      'Span 2–3, wire A: calm, stale',
      'Span 1–2, wire B: not assessed',
      'Span 2–3, wire B: calm',
    ]);
  });

  it('picks the span wire that is clicked', async () => {
    const drawing = mounted();
    await drawing.findAll('[role="gridcell"]')[3]?.trigger('click');
    expect(drawing.emitted('pick')).toEqual([[{ spanId: anId(22), wireId: anId(32) }]]);
  });

  it('walks by arrow keys and is one stop of the Tab key', async () => {
    const drawing = mounted();
    await drawing.find('[role="grid"]').trigger('keydown', { key: 'ArrowDown' });
    expect(drawing.emitted('pick')).toEqual([[{ spanId: anId(21), wireId: anId(32) }]]);
    expect(drawing.findAll('[role="gridcell"][tabindex="0"]')).toHaveLength(1);
  });

  it('draws planned dampers open and as-built ones filled', () => {
    const section = aSection({
      placements: [aPlacement(), aPlacement({ id: anId(61), side: 'to', state: 'as-built' })],
    });
    const symbols = mounted(section).findAll('[role="gridcell"] .damper-symbol');
    expect(symbols.map((symbol) => symbol.classes('is-as-built'))).toEqual([false, true]);
  });
});
