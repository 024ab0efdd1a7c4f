import type { Section } from '#shared/contract/sections.ts';
import { catenaryHeightM } from './catenary.ts';

type Structure = Section['structures'][number];
type Span = Section['spans'][number];
type Wire = Section['wires'][number];

/** Size of the drawing on the screen, px. */
const drawingHeight = 200;
const headRoom = 26;
const footRoom = 10;
const spanWidthLeast = 76;
const sideRoom = 24;
const curvePointCount = 24;
/** Steps at which the vertical exaggeration is stated. */
const exaggerationSteps = [1, 1.5, 2, 2.5, 3, 4, 5, 6, 8, 10, 12, 15, 20, 25, 30, 40, 50] as const;

export interface ProfileStructure {
  readonly id: string;
  readonly name: string;
  readonly isDeadEnd: boolean;
  readonly x: number;
  readonly footY: number;
  readonly topY: number;
}

export interface ProfileSpan {
  readonly id: string;
  readonly label: string;
  readonly fromX: number;
  readonly toX: number;
}

export interface SectionProfile {
  readonly width: number;
  readonly height: number;
  readonly exaggerationRatio: number;
  readonly structures: readonly ProfileStructure[];
  readonly spans: readonly ProfileSpan[];
  /** Outline of the ground, straight between the structures, closed at the lower edge. */
  readonly groundPath: string;
  /** Path of each wire in each span, by `wirePathKey`. */
  readonly wirePaths: ReadonlyMap<string, string>;
  /** Elevations to mark at the side. */
  readonly elevationMarks: readonly { readonly elevationM: number; readonly y: number }[];
}

/** Key of a wire's path in a span. */
export function wirePathKey(spanId: string, wireId: string): string {
  return `${spanId} ${wireId}`;
}

interface Scale {
  readonly x: (chainageM: number) => number;
  readonly y: (elevationM: number) => number;
}

interface Frame {
  readonly scale: Scale;
  readonly width: number;
  readonly exaggerationRatio: number;
  readonly lowestM: number;
  readonly highestM: number;
}

/** Largest stated exaggeration at which the drawing still fits its height. */
function exaggerationFor(horizontalPxPerM: number, reliefM: number): number {
  const fitting = (drawingHeight - headRoom - footRoom) / (Math.max(reliefM, 1) * horizontalPxPerM);
  return exaggerationSteps.findLast((step) => step <= fitting) ?? 1;
}

function frameOf(section: Section, availableWidth: number): Frame {
  const width = Math.max(availableWidth, section.spans.length * spanWidthLeast + 2 * sideRoom);
  const chainagesM = section.structures.map((structure) => structure.chainageM);
  const startM = Math.min(...chainagesM);
  const lengthM = Math.max(1, Math.max(...chainagesM) - startM);
  const pxPerM = (width - 2 * sideRoom) / lengthM;
  const lowestM = Math.min(...section.structures.map((structure) => structure.groundElevationM), lowestWireM(section));
  const highestM = Math.max(
    ...section.structures.map((structure) => structure.groundElevationM + structure.structureHeightM),
  );
  const exaggerationRatio = exaggerationFor(pxPerM, highestM - lowestM);
  return {
    scale: {
      x: (chainageM) => sideRoom + (chainageM - startM) * pxPerM,
      y: (elevationM) => drawingHeight - footRoom - (elevationM - lowestM) * pxPerM * exaggerationRatio,
    },
    width,
    exaggerationRatio,
    lowestM,
    highestM,
  };
}

function endsOf(section: Section, span: Span): readonly [Structure, Structure] | null {
  const from = section.structures.find((structure) => structure.id === span.fromStructureId);
  const to = section.structures.find((structure) => structure.id === span.toStructureId);
  return from === undefined || to === undefined ? null : [from, to];
}

const attachmentM = (structure: Structure) => structure.groundElevationM + structure.structureHeightM;

interface CurvePoint {
  readonly chainageM: number;
  readonly elevationM: number;
}

function wireCurve(ends: readonly [Structure, Structure], wire: Wire): CurvePoint[] {
  const [from, to] = ends;
  const spanLengthM = Math.max(1, to.chainageM - from.chainageM);
  const hanging = {
    tensionN: wire.tensionN,
    massKgPerM: wire.conductorMassKgPerM,
    spanLengthM,
    riseM: attachmentM(to) - attachmentM(from),
  };
  return Array.from({ length: curvePointCount + 1 }, (_, index) => {
    const distanceM = (spanLengthM * index) / curvePointCount;
    return {
      chainageM: from.chainageM + distanceM,
      elevationM: attachmentM(from) + catenaryHeightM(hanging, distanceM),
    };
  });
}

function lowestWireM(section: Section): number {
  return section.spans.reduce((lowestM, span) => {
    const ends = endsOf(section, span);
    if (ends === null) return lowestM;
    const elevationsM = section.wires.flatMap((wire) => wireCurve(ends, wire).map((point) => point.elevationM));
    return Math.min(lowestM, ...elevationsM);
  }, Infinity);
}

const coordinate = (value: number) => String(Math.round(value * 10) / 10);

function pathThrough(points: readonly CurvePoint[], scale: Scale): string {
  const pairs = points.map(
    (point) => `${coordinate(scale.x(point.chainageM))} ${coordinate(scale.y(point.elevationM))}`,
  );
  return `M${pairs.join('L')}`;
}

function groundPathOf(section: Section, { scale, width }: Frame): string {
  const feet = section.structures
    .map((structure) => ({ chainageM: structure.chainageM, elevationM: structure.groundElevationM }))
    .sort((one, other) => one.chainageM - other.chainageM);
  const [first, last] = [feet[0], feet.at(-1)];
  if (first === undefined || last === undefined) return '';
  const line = pathThrough(feet, scale).slice(1);
  const [firstY, lastY] = [coordinate(scale.y(first.elevationM)), coordinate(scale.y(last.elevationM))];
  return `M0 ${firstY}L${line}L${width} ${lastY}V${drawingHeight}H0Z`;
}

function elevationMarksOf({ scale, lowestM, highestM }: Frame): SectionProfile['elevationMarks'] {
  const stepM = [5, 10, 20, 50, 100, 200, 500].find((step) => (highestM - lowestM) / step <= 5) ?? 1000;
  const first = Math.ceil(lowestM / stepM);
  const count = Math.max(0, Math.floor(highestM / stepM) - first + 1);
  return Array.from({ length: count }, (_, index) => {
    const elevationM = (first + index) * stepM;
    return { elevationM, y: scale.y(elevationM) };
  });
}

/**
 * Drawing of a section seen from the side: to scale along the line, exaggerated vertically by a stated factor, wires
 * hanging as catenaries of their everyday tension. All wires are drawn at the one attachment height of a structure.
 *
 * @param availableWidth px the drawing may take before it grows beyond its box and scrolls
 */
export function sectionProfile(section: Section, availableWidth: number): SectionProfile {
  const frame = frameOf(section, availableWidth);
  const { scale } = frame;
  const wirePaths = new Map<string, string>();
  const spans = section.spans.flatMap((span): ProfileSpan[] => {
    const ends = endsOf(section, span);
    if (ends === null) return [];
    for (const wire of section.wires) {
      wirePaths.set(wirePathKey(span.id, wire.id), pathThrough(wireCurve(ends, wire), scale));
    }
    return [{ id: span.id, label: span.label, fromX: scale.x(ends[0].chainageM), toX: scale.x(ends[1].chainageM) }];
  });
  return {
    width: frame.width,
    height: drawingHeight,
    exaggerationRatio: frame.exaggerationRatio,
    structures: section.structures.map((structure) => ({
      id: structure.id,
      name: structure.name,
      isDeadEnd: structure.kind === 'dead-end',
      x: scale.x(structure.chainageM),
      footY: scale.y(structure.groundElevationM),
      topY: scale.y(attachmentM(structure)),
    })),
    spans,
    groundPath: groundPathOf(section, frame),
    wirePaths,
    elevationMarks: elevationMarksOf(frame),
  };
}
