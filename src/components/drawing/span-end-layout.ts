/** What a span-end diagram shows of one damper. */
export interface EndDamper {
  readonly id: string;
  readonly distanceM: number;
  readonly isAsBuilt: boolean;
}

export interface EndDamperMark extends EndDamper {
  readonly x: number;
  /** Where its dimension line stands: above the wire when planned, below when as built, a row for each. */
  readonly dimensionY: number;
}

export interface SpanEndLayout {
  readonly width: number;
  readonly height: number;
  readonly wireY: number;
  readonly scaleY: number;
  readonly clampX: number;
  /** Direction of growing distance: 1 to the right, −1 to the left. */
  readonly direction: 1 | -1;
  readonly marks: readonly EndDamperMark[];
  /** Whole metres (or steps) along the wire, for the scale below. */
  readonly ticks: readonly { readonly distanceM: number; readonly x: number }[];
}

const diagramWidth = 360;
const headRoom = 40;
const firstRowOffset = 26;
const rowHeight = 20;
/** Room between the lowest dimension and the scale, and for the figure below the scale. */
const scaleRoom = 44;
const scaleFoot = 22;
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

  const byDistance = [...dampers].sort((one, other) => one.distanceM - other.distanceM);
  const planned = byDistance.filter((damper) => !damper.isAsBuilt);
  const built = byDistance.filter((damper) => damper.isAsBuilt);
  const wireY = headRoom + firstRowOffset + Math.max(1, planned.length) * rowHeight;
  const scaleY = wireY + firstRowOffset + built.length * rowHeight + scaleRoom;
  const mark = (damper: EndDamper, offset: number): EndDamperMark => ({
    ...damper,
    x: place(damper.distanceM),
    dimensionY: wireY + offset,
  });
  return {
    width: diagramWidth,
    height: scaleY + scaleFoot,
    wireY,
    scaleY,
    clampX,
    direction,
    marks: [
      ...planned.map((damper, row) => mark(damper, -(firstRowOffset + row * rowHeight))),
      ...built.map((damper, row) => mark(damper, firstRowOffset + row * rowHeight)),
    ],
    ticks: Array.from({ length: Math.floor(shownM / stepM) + 1 }, (_, index) => ({
      distanceM: index * stepM,
      x: place(index * stepM),
    })),
  };
}
