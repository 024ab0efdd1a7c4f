import { describe, expect, it } from 'vitest';
import { formatNumber, formatQuantity } from './format-quantity.ts';
import { parseQuantity } from './parse.ts';
import { convertQuantity, quantityInSi, quantityUnits, unitSystems, type QuantityKind } from './quantity-kinds.ts';
import { toCamelCase, toSnakeCase, unitSuffixes } from './suffixes.ts';

const kinds = Object.keys(quantityUnits).filter((name): name is QuantityKind => name in quantityUnits);

describe('suffixes', () => {
  it.each(unitSuffixes)('takes a name that ends in %s to a column and back', (suffix) => {
    const name = `someQuantity${suffix}`;
    expect(toCamelCase(toSnakeCase(name))).toBe(name);
  });
});

describe('formatNumber', () => {
  it.each([
    [31.24, '31.2'],
    [0.0012345, '0.00123'],
    [27757, '27\u2009800'],
    [-0.0000000001, '0'],
    [9.996, '10.0'],
    [0, '0'],
    [Number.NaN, '–'],
    [Number.POSITIVE_INFINITY, '–'],
  ])('shows %f as %s', (value, text) => expect(formatNumber(value)).toBe(text));
});

describe('quantities', () => {
  // Factors: NIST SP 811, appendix B (published), recomputed.
  it.each([
    ['length', 350, '350\u2009m', '1\u2009150\u2009ft'],
    ['stress', 8.5e6, '8.50\u2009MPa', '1.23\u2009ksi'],
    ['force', 27757, '27.8\u2009kN', '6\u2009240\u2009lbf'],
    ['wind-speed', 4.4704, '4.47\u2009m/s', '10.0\u2009mph'],
    ['linear-mass', 1.62656, '1.63\u2009kg/m', '1.09\u2009lb/ft'],
  ] as const)('shows %s in both systems', (kind, value, metric, us) => {
    expect(formatQuantity(value, kind, { system: 'metric' })).toBe(metric);
    expect(formatQuantity(value, kind, { system: 'us' })).toBe(us);
  });

  it('comes back from the shown unit unchanged', () => {
    for (const kind of kinds) {
      for (const system of unitSystems)
        expect(quantityInSi(convertQuantity(12.5, kind, system), kind, system)).toBeCloseTo(12.5, 10);
    }
  });

  it('shows a dash where there is no value', () =>
    expect(formatQuantity(null, 'stress', { system: 'metric' })).toBe('–'));
});

describe('parseQuantity', () => {
  it.each([
    ['350', 'length', 'metric', 350],
    ['700 ft', 'length', 'metric', 213.36],
    ['1,05', 'damper-distance', 'metric', 1.05],
    ['105 cm', 'damper-distance', 'metric', 1.05],
    ['45 mph', 'wind-speed', 'metric', 20.1168],
    ['6240 lbf', 'force', 'metric', 27756.9],
    ['20 %', 'share', 'metric', 0.2],
    ['8.5 MPa', 'stress', 'us', 8.5e6],
    ['110 kV', 'voltage', 'metric', 110_000],
    ['1,150', 'length', 'us', 350.52],
    ['1,150.5 ft', 'length', 'us', 350.6724],
    ['27\u2009800 m', 'length', 'metric', 27_800],
  ] as const)('reads %s', async (text, kind, system, value) => {
    const parsed = await parseQuantity(text, kind, system);
    expect(parsed.ok).toBe(true);
    if (parsed.ok) expect(parsed.value / value).toBeCloseTo(1, 4);
  });

  it.each(['', 'about ten', '5 kg', 'NaN', 'Infinity', '1,150'])('refuses "%s" as a length', async (text) => {
    expect((await parseQuantity(text, 'length', 'metric')).ok).toBe(false);
  });
});
