/** One row of a file before it is checked: a CSV row or the properties of a GeoJSON feature. */
export interface RawRow {
  /** Row of a CSV file (the header is 1) or feature of a GeoJSON file (from 1). */
  readonly row: number;
  readonly values: Readonly<Record<string, unknown>>;
  /** Geometry of a GeoJSON feature or of a `wkt` column; null when there is none. */
  readonly geometry: RawGeometry | null;
}

export interface RawGeometry {
  readonly type: string;
  readonly coordinates: unknown;
}
