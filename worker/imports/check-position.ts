import { z } from 'zod';
import type { Position } from './geodesic-path.ts';
import type { IssueList } from './issue-list.ts';

interface Place {
  readonly row: number;
  readonly field: string;
}

const pairSchema = z.tuple([z.number(), z.number()], z.unknown());
const allowed = 'allowed: longitude from -180 to 180, then latitude from -90 to 90, WGS84';
const longitudeLimitDeg = 180;
const latitudeLimitDeg = 90;

/** A longitude and latitude pair as a position, or null with an error that tells crossed from senseless numbers. */
export function checkPosition(value: unknown, { row, field }: Place, issues: IssueList): Position | null {
  const pair = pairSchema.safeParse(value);
  if (!pair.success) {
    issues.addError({ row, field, value, message: `Must be two finite numbers; ${allowed}.` });
    return null;
  }
  const [longitudeDeg, latitudeDeg] = pair.data;
  if (Math.abs(longitudeDeg) <= longitudeLimitDeg && Math.abs(latitudeDeg) <= latitudeLimitDeg) {
    return { longitudeDeg, latitudeDeg };
  }
  const isCrossed = Math.abs(longitudeDeg) <= latitudeLimitDeg && Math.abs(latitudeDeg) <= longitudeLimitDeg;
  const reason = isCrossed ? 'Longitude and latitude are crossed' : 'The coordinates are not on earth';
  issues.addError({ row, field, value: [longitudeDeg, latitudeDeg], message: `${reason}; ${allowed}.` });
  return null;
}
