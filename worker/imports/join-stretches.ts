import { geodesicPath, type Position } from './geodesic-path.ts';
import { meetingDistanceM } from './span-limits.ts';

/** More than the meeting distance in degrees of latitude: a cheap first look before the distance is computed. */
const nearLatitudeDeg = 2e-5;

/** A run of points between two ends; ends of the same node are the same place. */
export interface Stretch {
  readonly points: readonly Position[];
  readonly startNodeIndex: number;
  readonly endNodeIndex: number;
}

function nodeFinder(): (point: Position) => number {
  const nodes: Position[] = [];
  return (point) => {
    const found = nodes.findIndex(
      (node) =>
        Math.abs(node.latitudeDeg - point.latitudeDeg) < nearLatitudeDeg &&
        geodesicPath(node, point).lengthM <= meetingDistanceM,
    );
    if (found !== -1) return found;
    nodes.push(point);
    return nodes.length - 1;
  };
}

/** Gives the ends of parts their nodes; parts of one point are dropped. */
export function stretchesOfParts(parts: readonly (readonly Position[])[]): Stretch[] {
  const nodeOf = nodeFinder();
  return parts.flatMap((points) => {
    const [start] = points;
    const end = points[points.length - 1];
    if (start === undefined || end === undefined || points.length < 2) return [];
    return [{ points, startNodeIndex: nodeOf(start), endNodeIndex: nodeOf(end) }];
  });
}

function reversed(stretch: Stretch): Stretch {
  return {
    points: stretch.points.toReversed(),
    startNodeIndex: stretch.endNodeIndex,
    endNodeIndex: stretch.startNodeIndex,
  };
}

/**
 * Joins stretches end to end where exactly two ends meet. Where three or more meet, the line branches and each stretch
 * ends there.
 */
export function joinStretches(stretches: readonly Stretch[]): Stretch[] {
  const atNode = new Map<number, Stretch[]>();
  for (const stretch of stretches) {
    for (const node of [stretch.startNodeIndex, stretch.endNodeIndex]) {
      atNode.set(node, [...(atNode.get(node) ?? []), stretch]);
    }
  }
  const used = new Set<Stretch>();
  const grow = (chain: Stretch): Stretch => {
    let grown = chain;
    for (;;) {
      const meeting = atNode.get(grown.endNodeIndex) ?? [];
      const next = meeting.length === 2 ? meeting.find((one) => !used.has(one)) : undefined;
      if (next === undefined) return grown;
      used.add(next);
      const onward = next.startNodeIndex === grown.endNodeIndex ? next : reversed(next);
      grown = {
        points: [...grown.points, ...onward.points.slice(1)],
        startNodeIndex: grown.startNodeIndex,
        endNodeIndex: onward.endNodeIndex,
      };
    }
  };
  return stretches.flatMap((stretch) => {
    if (used.has(stretch)) return [];
    used.add(stretch);
    // Forward from the end, then the same from the start by turning the chain round twice.
    return [reversed(grow(reversed(grow(stretch))))];
  });
}
