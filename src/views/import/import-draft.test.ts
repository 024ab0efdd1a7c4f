import { describe, expect, it } from 'vitest';
import { checkDraft, fileFault, formatOf, freshDraft } from './import-draft.ts';

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
    if (!checked.ok)
      expect(checked.faults).toEqual({ 'voltageClasses.0.conductorName': 'Choose a conductor from the catalogue.' });
  });

  it('asks for a number where a field is empty, and says what is allowed where it is out of range', () => {
    const [one] = freshDraft().voltageClasses;
    if (one === undefined) expect.unreachable();
    const voltageClasses = [{ ...one, conductor: { name: 'Drake', standard: 'x' }, tensionRatedRatio: 0.9 }];
    const checked = checkDraft(
      { ...freshDraft(), kind: 'centre-line', typicalSpanLengthM: null, voltageClasses },
      false,
    );
    const faults = checked.ok ? {} : checked.faults;
    expect(Object.keys(faults).sort()).toEqual(['typicalSpanLengthM', 'voltageClasses.0.tensionRatedRatio']);
    expect(faults['typicalSpanLengthM']).toBe('Enter a number.');
    expect(faults['voltageClasses.0.tensionRatedRatio']).toContain('0.5');
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

describe('fileFault', () => {
  it.each([
    ['lines.csv', 10, ''],
    ['lines.zip', 10, '.geojson, .json or .csv'],
    ['lines.csv', 0, 'empty'],
    ['lines.csv', 50 * 1024 * 1024, '40 MB'],
  ])('says of %s with %d bytes: %s', (name, size, words) => {
    const fault = fileFault({ name, size });
    if (words === '') expect(fault).toBe('');
    else expect(fault).toContain(words);
  });
});
