import type { CentreLine } from './read-centre-lines.ts';
import { geodesicPath, type Position } from './geodesic-path.ts';
import type { IssueList } from './issue-list.ts';
import { joinStretches, stretchesOfParts, type Stretch } from './join-stretches.ts';
import { shortestDividedSpanM } from './span-limits.ts';

const shownDigitCount = 5;

export function pathLengthM(points: readonly Position[]): number {
  return points.slice(1).reduce((sum, point, index) => {
    const former = points[index];
    return former === undefined ? sum : sum + geodesicPath(former, point).lengthM;
  }, 0);
}

function placeText({ longitudeDeg, latitudeDeg }: Position): string {
  return `${longitudeDeg.toFixed(shownDigitCount)}, ${latitudeDeg.toFixed(shownDigitCount)}`;
}

function withoutTwins(line: CentreLine, issues: IssueList): Position[][] {
  const seen = new Set<string>();
  return line.parts.filter((points) => {
    const forward = points.map(placeText);
    const key = [forward.join(';'), forward.toReversed().join(';')].sort()[0] ?? '';
    const isTwin = seen.has(key);
    seen.add(key);
    if (isTwin && points[0] !== undefined) {
      const message = `Left out: a part of "${line.name}" is drawn twice.`;
      issues.addNotice({ row: line.row, field: 'geometry', value: placeText(points[0]), message });
    }
    return !isTwin;
  });
}

/** Points at least the shortest span apart; both ends stay. */
export function thinPoints(points: readonly Position[]): Position[] {
  const [first, ...rest] = points;
  const last = rest.pop();
  if (first === undefined || last === undefined) return [...points];
  const isNear = (one: Position | undefined, other: Position) =>
    one !== undefined && geodesicPath(one, other).lengthM < shortestDividedSpanM;
  const kept = [first];
  for (const point of rest) if (!isNear(kept[kept.length - 1], point)) kept.push(point);
  while (kept.length > 1 && isNear(kept[kept.length - 1], last)) kept.pop();
  return [...kept, last];
}

interface Prepared {
  readonly stretches: Stretch[];
  readonly leftOutCount: number;
}

/** Parts of a line joined to stretches; twins and stubs are left out and named, points too near their neighbour too. */
export function prepareStretches(line: CentreLine, minimumLengthM: number, issues: IssueList): Prepared {
  const parts = withoutTwins(line, issues);
  const joined = joinStretches(stretchesOfParts(parts));
  const long = joined.filter(({ points }) => {
    const lengthM = pathLengthM(points);
    if (lengthM >= Math.max(minimumLengthM, shortestDividedSpanM)) return true;
    const at = points[0] === undefined ? '' : placeText(points[0]);
    const message = `Left out: a stretch of "${line.name}" that is ${lengthM.toFixed(1)} m long; stretches below ${minimumLengthM} m are taken as stubs.`;
    issues.addNotice({ row: line.row, field: 'geometry', value: at, message });
    return false;
  });
  // Without its stubs a line may run on where it seemed to branch.
  const stretches = joinStretches(long).map((stretch) => {
    const points = thinPoints(stretch.points);
    const droppedCount = stretch.points.length - points.length;
    if (droppedCount > 0) {
      const message = `${droppedCount} points of "${line.name}" closer than ${shortestDividedSpanM} m to the next were left out.`;
      issues.addNotice({ row: line.row, field: 'geometry', message });
    }
    return { ...stretch, points };
  });
  return { stretches, leftOutCount: line.parts.length - parts.length + joined.length - long.length };
}
