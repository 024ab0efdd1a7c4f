import type { RawGeometry } from './raw-row.ts';

const shape = /^\s*(?:SRID=\d+;)?\s*(MULTILINESTRING|LINESTRING|POINT)\s*(?:Z|M|ZM)?\s*\((.*)\)\s*$/is;

function points(text: string): number[][] {
  return text.split(',').map((pair) => pair.trim().split(/\s+/).map(Number));
}

/** Geometry of well-known text (POINT, LINESTRING, MULTILINESTRING); anything else keeps its first word as the type. */
export function readWkt(text: string): RawGeometry {
  const found = shape.exec(text);
  const [, name = '', body = ''] = found ?? [];
  switch (name.toUpperCase()) {
    case 'POINT':
      return { type: 'Point', coordinates: points(body)[0] ?? [] };
    case 'LINESTRING':
      return { type: 'LineString', coordinates: points(body) };
    case 'MULTILINESTRING':
      return {
        type: 'MultiLineString',
        coordinates: [...body.matchAll(/\(([^()]*)\)/g)].map((part) => points(part[1] ?? '')),
      };
    default:
      return { type: text.trim().split(/[\s(]/)[0] ?? '', coordinates: null };
  }
}
