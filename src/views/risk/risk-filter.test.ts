import { describe, expect, it } from 'vitest';
import type { RiskFilter } from './risk-filter.ts';
import { changedFilter, firstRiskFilter, riskAddress, riskFilterFrom, sortedBy } from './risk-filter.ts';

const full: RiskFilter = {
  sort: 'life',
  direction: 'ascending',
  grades: ['act', 'urgent'],
  lineId: '0198d3c2-7a50-7000-8000-000000000001',
  search: 'harbour 14',
  isStale: true,
  isAssessed: false,
  cursor: 'abc',
};

describe('the filter in the address', () => {
  it('survives the way there and back', () => {
    expect(riskFilterFrom(riskAddress(full))).toEqual(full);
    expect(riskAddress(firstRiskFilter)).toEqual({});
    expect(riskFilterFrom({})).toEqual(firstRiskFilter);
  });

  it('takes nothing unknown from the address', () => {
    expect(riskFilterFrom({ sort: 'beauty', grades: 'act,awful', isStale: 'perhaps', direction: 'up' })).toEqual({
      ...firstRiskFilter,
      grades: ['act'],
    });
  });
});

describe('changes', () => {
  it('start again at the first page', () => {
    expect(changedFilter(full, { search: '' }).cursor).toBeNull();
  });

  it('sort turns round the second time, and a short life comes first', () => {
    expect(sortedBy(firstRiskFilter, 'life')).toMatchObject({ sort: 'life', direction: 'ascending' });
    expect(sortedBy(firstRiskFilter, 'stress')).toMatchObject({ sort: 'stress', direction: 'descending' });
    expect(sortedBy(firstRiskFilter, 'grade')).toMatchObject({ sort: 'grade', direction: 'ascending' });
  });
});
