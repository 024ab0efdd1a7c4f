import { describe, expect, it } from 'vitest';
import { gradesFrom, placeFrom } from './use-map-address.ts';

describe('placeFrom', () => {
  it('reads a place', () =>
    expect(placeFrom({ lat: '-38.5', lng: '-21', z: '13' })).toEqual({
      latitudeDeg: -38.5,
      longitudeDeg: -21,
      zoom: 13,
    }));

  it.each([{}, { lat: '1', lng: '2' }, { lat: 'x', lng: '2', z: '3' }, { lat: '', lng: '2', z: '3' }])(
    'takes no half place: %o',
    (query) => expect(placeFrom(query)).toBeNull(),
  );
});

describe('gradesFrom', () => {
  it('keeps the grades it knows', () => expect(gradesFrom('urgent,purple,act')).toEqual(['urgent', 'act']));
  it('shows all without any', () => expect(gradesFrom(undefined)).toEqual([]));
});
