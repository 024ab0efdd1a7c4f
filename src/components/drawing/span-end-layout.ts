/** What a span-end diagram shows of one damper. */
export interface EndDamper {
  readonly id: string;
  readonly distanceM: number;
  readonly isAsBuilt: boolean;
}

export interface EndDamperMark extends EndDamper {
  readonly x: number;
  /** Row of its dimension line, counted away from the wire; planned ones above, as-built ones below. */
  readonly rowIndex: number;
}

export interface SpanEndLayout {
  readonly width: number;
  readonly clampX: number;
  /** Direction of growing distance: 1 to the right, −1 to the left. */
  readonly direction: 1 | -1;
  readonly marks: readonly EndDamperMark[];
  /** Whole metres (or steps) along the wire, for the scale below. */
  readonly ticks: readonly { readonly distanceM: number; readonly x: number }[];
}

const diagramWidth = 360;
const clampMargin = 48;
const farMargin = 24;
/** The diagram shows at least this much wire, so that a lone damper close to the clamp is not drawn far away. */
const shownLeastM = 2;
const shownBeyondRatio = 1.2;
const tickStepsM = [0.25, 0.5, 1, 2, 5, 10] as const;
const ticksMost = 6;

function tickStepM(shownM: number): number {
  return tickStepsM.find((stepM) => shownM / stepM <= ticksMost) ?? 20;
}

function rowed(dampers: readonly EndDamper[], place: (distanceM: number) => number): EndDamperMark[] {
  return [...dampers]
    .sort((one, other) => one.distanceM - other.distanceM)
    .map((damper, rowIndex) => ({ ...damper, rowIndex, x: place(damper.distanceM) }));
}

/**
 * Places of dampers at one end of a span, to scale from the clamp outwards. The first end is drawn with the structure at
 * the left, the second with the structure at the right, as they are seen from the side of the line.
 */
export function spanEndLayout(side: 'from' | 'to', dampers: readonly EndDamper[]): SpanEndLayout {
  const farthestM = dampers.reduce((most, damper) => Math.max(most, damper.distanceM), 0);
  const shownM = Math.max(shownLeastM, farthestM * shownBeyondRatio);
  const direction = side === 'from' ? 1 : -1;
  const clampX = side === 'from' ? clampMargin : diagramWidth - clampMargin;
  const pxPerM = (diagramWidth - clampMargin - farMargin) / shownM;
  const place = (distanceM: number) => clampX + direction * distanceM * pxPerM;
  const stepM = tickStepM(shownM);
  return {
    width: diagramWidth,
    clampX,
    direction,
    marks: [
      ...rowed(
        dampers.filter((damper) => !damper.isAsBuilt),
        place,
      ),
      ...rowed(
        dampers.filter((damper) => damper.isAsBuilt),
        place,
      ),
    ],
    ticks: Array.from({ length: Math.floor(shownM / stepM) + 1 }, (_, index) => ({
      distanceM: index * stepM,
      x: place(index * stepM),
    })),
  };
}
