import { describe, expect, it } from 'vitest';
import { checkDraft, formatOf, freshDraft } from './import-draft.ts';

describe('checkDraft', () => {
  it('takes a surveyed file without assumptions', () => {
    expect(checkDraft(freshDraft(), true)).toEqual({
      ok: true,
      options: { kind: 'surveyed', format: 'geojson', isDryRun: true },
    });
  });

  it('wants a conductor for every voltage class of a centre-line file, and names it', () => {
    const checked = checkDraft({ ...freshDraft(), kind: 'centre-line' }, false);
    expect(checked.ok).toBe(false);
    if (!checked.ok) expect(checked.faults.join()).toContain('voltageClasses 0 conductorName');
  });

  it('sends angles in degrees', () => {
    const draft = freshDraft();
    const voltageClasses = draft.voltageClasses.map((one) => ({ ...one, conductor: { name: 'Drake', standard: 'x' } }));
    const checked = checkDraft({ ...draft, kind: 'centre-line', voltageClasses }, false);
    expect(checked.ok && checked.options.assumptions?.deadEndFromTurnDeg).toBe(10);
  });
});

describe('formatOf', () => {
  it.each([
    ['a.GeoJSON', 'geojson'],
    ['b.json', 'geojson'],
    ['c.csv', 'csv'],
    ['d.zip', null],
  ] as const)('tells %s', (name, format) => expect(formatOf(name)).toBe(format));
});
