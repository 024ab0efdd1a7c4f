/** A place on an island: metres east and north of its middle. The islands are invented and small, so a plane will do. */
export interface Place {
  readonly eastM: number;
  readonly northM: number;
}

export interface Anchor {
  readonly longitudeDeg: number;
  readonly latitudeDeg: number;
}

const metresPerLatitudeDeg = 111_000;
const digitFactor = 1e6;

export function kilometres(eastKm: number, northKm: number): Place {
  return { eastM: eastKm * 1000, northM: northKm * 1000 };
}

export function distanceM(one: Place, other: Place): number {
  return Math.hypot(other.eastM - one.eastM, other.northM - one.northM);
}

/** The place at a share of the way. */
export function between(from: Place, to: Place, shareRatio: number): Place {
  return {
    eastM: from.eastM + (to.eastM - from.eastM) * shareRatio,
    northM: from.northM + (to.northM - from.northM) * shareRatio,
  };
}

/** A place moved to the left of the way from one place to another. */
export function aside(place: Place, way: readonly [Place, Place], leftM: number): Place {
  const [from, to] = way;
  const lengthM = distanceM(from, to);
  return {
    eastM: place.eastM - ((to.northM - from.northM) / lengthM) * leftM,
    northM: place.northM + ((to.eastM - from.eastM) / lengthM) * leftM,
  };
}

/** Turn at the middle of three places, degrees, without sign. */
export function turnAtDeg(from: Place, at: Place, to: Place): number {
  const before = Math.atan2(at.eastM - from.eastM, at.northM - from.northM);
  const after = Math.atan2(to.eastM - at.eastM, to.northM - at.northM);
  const turn = Math.abs(after - before);
  return (Math.min(turn, 2 * Math.PI - turn) * 180) / Math.PI;
}

/** Longitude and latitude, rounded to a tenth of a metre. */
export function coordinatesDeg({ eastM, northM }: Place, anchor: Anchor): [number, number] {
  const metresPerLongitudeDeg = metresPerLatitudeDeg * Math.cos((anchor.latitudeDeg * Math.PI) / 180);
  const rounded = (value: number) => Math.round(value * digitFactor) / digitFactor;
  return [
    rounded(anchor.longitudeDeg + eastM / metresPerLongitudeDeg),
    rounded(anchor.latitudeDeg + northM / metresPerLatitudeDeg),
  ];
}
