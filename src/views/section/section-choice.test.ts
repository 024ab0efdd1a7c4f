import { describe, expect, it } from 'vitest';
import { aSection, anId } from '#src/components/drawing/a-section.ts';
import { chosenSpanWire, chosenTab } from './section-choice.ts';

const section = aSection();

describe('chosenSpanWire', () => {
  it('takes the span wire the address names', () => {
    expect(chosenSpanWire(section, { span: anId(22), wire: anId(32) })?.id).toBe(anId(44));
  });

  it('takes the id of the span wire for the wire as well', () => {
    expect(chosenSpanWire(section, { span: anId(22), wire: anId(44) })?.id).toBe(anId(44));
  });

  it('opens at the worst span wire when nothing is asked', () => {
    expect(chosenSpanWire(section, { span: null, wire: null })?.id).toBe(anId(41));
  });

  it('opens at the worst wire of the span when only the span is asked or the wire is unknown', () => {
    expect(chosenSpanWire(section, { span: anId(22), wire: null })?.id).toBe(anId(43));
    expect(chosenSpanWire(section, { span: anId(22), wire: 'gone' })?.spanId).toBe(anId(22));
  });

  it('falls back to the section when the span is unknown, and to nothing when there is nothing', () => {
    expect(chosenSpanWire(section, { span: 'gone', wire: null })?.id).toBe(anId(41));
    expect(chosenSpanWire(aSection({ spanWires: [] }), { span: null, wire: null })).toBeNull();
  });
});

describe('chosenTab', () => {
  it('knows its tabs and nothing else', () => {
    expect(chosenTab('history')).toBe('history');
    expect(chosenTab('bench')).toBe('vibration');
    expect(chosenTab(null)).toBe('vibration');
  });
});
