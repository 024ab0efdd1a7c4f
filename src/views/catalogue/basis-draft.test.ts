import { describe, expect, it } from 'vitest';
import type { BasisSpec } from '#shared/contract/bases.ts';
import { basisDraft, checkedBasis } from './basis-draft.ts';

const spec: BasisSpec = {
  windBand: { lowerMPerS: 1, upperMPerS: 7 },
  frequencyCount: 150,
  methods: {},
  limits: {
    enduranceMultiLayerPa: 8.5e6,
    enduranceSingleLayerPa: 22.5e6,
    enduranceAlloyPa: 5.7e6,
    enduranceSource: 'invented for a test',
    damperedStrainRatio: null,
    damperedStrainConvention: 'peak-to-peak',
    damperedStrainSource: '',
  },
  governs: 'limit',
  thresholds: {
    noticeFromRatio: 0.8,
    actFromRatio: 1,
    urgentFromRatio: 1.5,
    noticeBelowYears: 80,
    actBelowYears: 40,
    urgentBelowYears: 10,
  },
  climateId: null,
  airDensityKgPerM3: 1.225,
  digestFromCount: 25,
};
const draft = basisDraft({ name: 'House rules', isDefault: false, spec });
const withNumbers = (numbers: Partial<typeof draft.numbers>) => ({
  ...draft,
  numbers: { ...draft.numbers, ...numbers },
});

describe('checkedBasis', () => {
  it('gives back what it was made from when nothing is changed', () => {
    expect(checkedBasis(draft, spec)).toEqual({ spec, faults: {} });
  });

  it('keeps what the form does not show', () => {
    const changed = checkedBasis(withNumbers({ actFromRatio: 1.1 }), spec).spec;
    expect(changed).toEqual({ ...spec, thresholds: { ...spec.thresholds, actFromRatio: 1.1 } });
  });

  it('names an empty field and refuses to save', () => {
    const { spec: saved, faults } = checkedBasis(withNumbers({ enduranceAlloyPa: null }), spec);
    expect(saved).toBeNull();
    expect(faults).toEqual({ enduranceAlloyPa: 'is required' });
  });

  it('wants a wind band that opens upwards', () => {
    expect(checkedBasis(withNumbers({ windLowerMPerS: 8 }), spec).faults).toEqual({
      windUpperMPerS: 'lower end must be below the upper end',
    });
  });

  it('wants thresholds in the order of the grades', () => {
    expect(checkedBasis(withNumbers({ urgentFromRatio: 0.9 }), spec).faults.urgentFromRatio).toContain('above');
    expect(checkedBasis(withNumbers({ urgentBelowYears: 50 }), spec).faults.urgentBelowYears).toContain('below');
    expect(checkedBasis(withNumbers({ urgentBelowYears: 50 }), spec).spec).toBeNull();
  });

  it('wants a name and a source for the limits', () => {
    expect(Object.keys(checkedBasis({ ...draft, name: ' ', enduranceSource: '' }, spec).faults).sort()).toEqual([
      'enduranceSource',
      'name',
    ]);
  });
});
