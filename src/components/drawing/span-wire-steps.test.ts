import { describe, expect, it } from 'vitest';
import { aSection, anId } from './a-section.ts';
import { steppedChoice } from './span-wire-steps.ts';

const section = aSection();
const first = { spanId: anId(21), wireId: anId(31) };

describe('steppedChoice', () => {
  it('walks spans sideways and wires up and down', () => {
    expect(steppedChoice(section, first, 'ArrowRight')).toEqual({ spanId: anId(22), wireId: anId(31) });
    expect(steppedChoice(section, first, 'ArrowDown')).toEqual({ spanId: anId(21), wireId: anId(32) });
    expect(steppedChoice(section, first, 'End')).toEqual({ spanId: anId(22), wireId: anId(31) });
  });

  it('stays at the edges and leaves other keys alone', () => {
    expect(steppedChoice(section, first, 'ArrowLeft')).toBeNull();
    expect(steppedChoice(section, first, 'ArrowUp')).toBeNull();
    expect(steppedChoice(section, first, 'Tab')).toBeNull();
  });
});
