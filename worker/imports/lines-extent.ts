import { geodesicPath, type Position } from './geodesic-path.ts';
import type { LineDraft } from './line-draft.ts';

/** A utility's own ground: lines this near to what it has are believed, whatever their coordinates (own model). */
const ownGroundM = 500_000;

/** West, south, east, north. */
export type Extent = readonly [number, number, number, number];

/** The box round all structures, or null without any. */
export function extentOf(lines: readonly LineDraft[]): Extent | null {
  let extent: [number, number, number, number] | null = null;
  for (const { structures } of lines) {
    for (const { position } of structures) {
      const { longitudeDeg, latitudeDeg } = position;
      const [west, south, east, north]: Extent = extent ?? [longitudeDeg, latitudeDeg, longitudeDeg, latitudeDeg];
      extent = [
        Math.min(west, longitudeDeg),
        Math.min(south, latitudeDeg),
        Math.max(east, longitudeDeg),
        Math.max(north, latitudeDeg),
      ];
    }
  }
  return extent;
}

function centreOf([west = 0, south = 0, east = 0, north = 0]: readonly number[]): Position {
  return { longitudeDeg: (west + east) / 2, latitudeDeg: (south + north) / 2 };
}

/**
 * True when lines lie far from everything the utility has, but would lie near it with longitude and latitude exchanged:
 * both orders may be on earth, so the range of the numbers alone cannot tell.
 */
export function isCrossed(extent: Extent, storedExtentDeg: readonly number[] | null): boolean {
  if (storedExtentDeg === null) return false;
  const stored = centreOf(storedExtentDeg);
  const given = centreOf(extent);
  const exchanged = { longitudeDeg: given.latitudeDeg, latitudeDeg: given.longitudeDeg };
  if (Math.abs(exchanged.latitudeDeg) > 90) return false;
  return geodesicPath(stored, given).lengthM > ownGroundM && geodesicPath(stored, exchanged).lengthM < ownGroundM;
}
