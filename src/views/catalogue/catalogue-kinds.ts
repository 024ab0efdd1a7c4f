/** The catalogues, as they stand in the address. */
export const catalogueKinds = [
  { key: 'conductors', label: 'Conductors' },
  { key: 'damper-types', label: 'Damper types' },
  { key: 'climates', label: 'Climates' },
  { key: 'terrain-zones', label: 'Terrain zones' },
  { key: 'bases', label: 'Bases' },
] as const;
export type CatalogueKind = (typeof catalogueKinds)[number]['key'];
