import geographiclib from 'geographiclib-geodesic';

const ellipsoid = geographiclib.Geodesic.WGS84;
const fullTurnDeg = 360;

/** A point on earth, WGS84. */
export interface Position {
  readonly longitudeDeg: number;
  readonly latitudeDeg: number;
}

export interface GeodesicPath {
  readonly lengthM: number;
  /** Bearing at the start, clockwise from north, 0 up to 360. */
  readonly startBearingDeg: number;
  /** Bearing at the end, same convention. */
  readonly endBearingDeg: number;
}

function wrapBearing(bearingDeg: number): number {
  const wrapped = ((bearingDeg % fullTurnDeg) + fullTurnDeg) % fullTurnDeg;
  return wrapped === fullTurnDeg ? 0 : wrapped;
}

/**
 * Shortest path between two points on the WGS84 ellipsoid.
 *
 * @source published: C. F. F. Karney, Algorithms for geodesics, J. Geodesy 87 (2013) 43, by the library of its author
 */
export function geodesicPath(from: Position, to: Position): GeodesicPath {
  const found = ellipsoid.Inverse(from.latitudeDeg, from.longitudeDeg, to.latitudeDeg, to.longitudeDeg);
  return {
    lengthM: found.s12 ?? 0,
    startBearingDeg: wrapBearing(found.azi1 ?? 0),
    endBearingDeg: wrapBearing(found.azi2 ?? 0),
  };
}

/** Bearing at the middle of a path; the ends differ by the convergence of the meridians only. */
export function middleBearingDeg(path: GeodesicPath): number {
  return wrapBearing(path.startBearingDeg + turnDeg(path.startBearingDeg, path.endBearingDeg) / 2);
}

/** Signed turn from one bearing to another, above -180 and up to 180, positive clockwise. */
export function turnDeg(fromBearingDeg: number, toBearingDeg: number): number {
  const turn = wrapBearing(toBearingDeg - fromBearingDeg);
  return turn > fullTurnDeg / 2 ? turn - fullTurnDeg : turn;
}

/** Points that divide the path between two points into equal pieces; the ends are not among them. */
export function dividePath(from: Position, to: Position, pieceCount: number): Position[] {
  if (pieceCount < 2) return [];
  const path = ellipsoid.InverseLine(from.latitudeDeg, from.longitudeDeg, to.latitudeDeg, to.longitudeDeg);
  const pieceLengthM = (path.s13 ?? 0) / pieceCount;
  return Array.from({ length: pieceCount - 1 }, (_, index) => {
    const point = path.Position(pieceLengthM * (index + 1));
    return { longitudeDeg: point.lon2 ?? from.longitudeDeg, latitudeDeg: point.lat2 ?? from.latitudeDeg };
  });
}
