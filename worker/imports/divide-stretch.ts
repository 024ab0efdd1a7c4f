import { dividePath, geodesicPath, turnDeg, type Position } from './geodesic-path.ts';
import { longestDividedSpanM, shortestDividedSpanM } from './span-limits.ts';

interface Division {
  readonly typicalSpanLengthM: number;
  readonly deadEndFromTurnDeg: number;
}

export interface DividedPoint {
  readonly position: Position;
  readonly isDeadEnd: boolean;
}

/** Equal spans of a leg: the whole number that comes nearest to the typical length and keeps spans within their bounds. */
export function spanCountOf(legLengthM: number, typicalSpanLengthM: number): number {
  const nearest = Math.round(legLengthM / typicalSpanLengthM);
  const fewest = Math.max(1, Math.ceil(legLengthM / longestDividedSpanM));
  return Math.max(fewest, Math.min(nearest, Math.floor(legLengthM / shortestDividedSpanM)));
}

/** Structures along a stretch: its ends and sharp turns as dead-ends, its other points and the dividing points not. */
export function divideStretch(points: readonly Position[], division: Division): DividedPoint[] {
  const divided: DividedPoint[] = [];
  let formerBearingDeg: number | null = null;
  points.slice(0, -1).forEach((from, index) => {
    const to = points[index + 1];
    if (to === undefined) return;
    const leg = geodesicPath(from, to);
    const isTurn =
      formerBearingDeg === null ||
      Math.abs(turnDeg(formerBearingDeg, leg.startBearingDeg)) > division.deadEndFromTurnDeg;
    divided.push({ position: from, isDeadEnd: isTurn });
    const between = dividePath(from, to, spanCountOf(leg.lengthM, division.typicalSpanLengthM));
    divided.push(...between.map((position) => ({ position, isDeadEnd: false })));
    formerBearingDeg = leg.endBearingDeg;
  });
  const last = points[points.length - 1];
  return last === undefined ? divided : [...divided, { position: last, isDeadEnd: true }];
}
