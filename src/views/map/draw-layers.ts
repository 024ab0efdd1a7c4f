import * as leaflet from 'leaflet';
import type { z } from 'zod';
import type { mapSectionsSchema, mapSpansSchema, mapStructuresSchema, mapTerrainSchema } from '#shared/contract/map.ts';
import type { Grade } from '#shared/contract/grades.ts';
import { pickedStroke, strokesOf, terrainFill, type MapPalette } from './line-style.ts';

type Sections = z.infer<typeof mapSectionsSchema>;
type Spans = z.infer<typeof mapSpansSchema>;
type Structures = z.infer<typeof mapStructuresSchema>;
type Terrain = z.infer<typeof mapTerrainSchema>;

const latLng = (position: readonly number[]): [number, number] => [position[1] ?? 0, position[0] ?? 0];
const path = (coordinates: readonly (readonly number[])[]) => coordinates.map(latLng);

export interface LineDrawing {
  readonly palette: MapPalette;
  readonly renderer: leaflet.Renderer;
  /** Grades to show; empty shows all. */
  readonly grades: readonly Grade[];
  /** Pixels between two places at the zoom that holds. */
  readonly distancePx: (from: [number, number], to: [number, number]) => number;
}

function isShown(grade: Grade | null, grades: readonly Grade[]): boolean {
  return grades.length === 0 || (grade !== null && grades.includes(grade));
}

interface DrawnLine {
  readonly id: string;
  readonly points: [number, number][];
  readonly grade: Grade | null;
  readonly isStale: boolean;
  readonly tooltip: string;
}

/** What each stroke that takes clicks stands for. */
const drawnLines = new WeakMap<leaflet.Layer, DrawnLine>();

/**
 * A group whose lines share one tooltip and one click handler: thousands of their own would make drawing slow.
 *
 * @param onPick told the id of the line that was clicked
 */
export function lineGroup(onPick: (id: string) => void): leaflet.FeatureGroup {
  const group = leaflet.featureGroup();
  group.bindTooltip((layer) => drawnLines.get(layer)?.tooltip ?? '', { sticky: true });
  group.on('click', (event: leaflet.LeafletMouseEvent) => {
    leaflet.DomEvent.stopPropagation(event);
    const layer: unknown = event.propagatedFrom;
    const line = layer instanceof leaflet.Layer ? drawnLines.get(layer) : undefined;
    if (line !== undefined) onPick(line.id);
  });
  return group;
}

function addLine(group: leaflet.LayerGroup, line: DrawnLine, drawing: LineDrawing): void {
  const { renderer, palette } = drawing;
  const strokes = strokesOf(line, palette);
  strokes.forEach((stroke, index) => {
    // The lowest stroke takes the clicks; those above it only draw.
    const drawn = leaflet.polyline(line.points, { ...stroke, renderer, interactive: index === 0 }).addTo(group);
    if (index > 0) return;
    drawnLines.set(drawn, line);
  });
}

const words = { calm: 'Calm', notice: 'Notice', act: 'Act', urgent: 'Urgent' } as const;

function stateWords(state: { grade: Grade | null; isStale: boolean; isAssumed: boolean }): string {
  const parts = [state.grade === null ? 'not assessed' : words[state.grade]];
  if (state.isStale) parts.push('stale');
  if (state.isAssumed) parts.push('assumed');
  return parts.join(', ');
}

/** A text node escapes what names may hold. */
function plain(text: string): string {
  const element = document.createElement('span');
  element.textContent = text;
  return element.innerHTML;
}

export function drawSections(group: leaflet.LayerGroup, sections: Sections, drawing: LineDrawing): void {
  group.clearLayers();
  for (const { id, geometry, properties } of sections.features) {
    if (!isShown(properties.grade, drawing.grades)) continue;
    const tooltip = plain(
      `${properties.lineName}, section ${properties.name}, ${properties.spanCount} spans: ${stateWords(properties)}`,
    );
    addLine(group, { id, points: path(geometry.coordinates), ...properties, tooltip }, drawing);
  }
}

export function drawSpans(group: leaflet.LayerGroup, spans: Spans, drawing: LineDrawing): void {
  group.clearLayers();
  for (const { id, geometry, properties } of spans.features) {
    if (!isShown(properties.grade, drawing.grades)) continue;
    const tooltip = plain(`${properties.lineName}, span ${properties.label}: ${stateWords(properties)}`);
    const points = path(geometry.coordinates);
    addLine(group, { id, points, ...properties, tooltip }, drawing);
    for (const damper of properties.dampers) drawDamperTick(group, points, { ...damper, drawing });
  }
}

interface PickedDrawing {
  readonly palette: MapPalette;
  readonly renderer: leaflet.Renderer;
  readonly isPicked: (id: string) => boolean;
}

/** Halos of picked lines: apart from the lines, so that a pick does not draw the network again. */
export function drawPicked(group: leaflet.LayerGroup, lines: Sections | Spans, drawing: PickedDrawing): void {
  group.clearLayers();
  const style = { ...pickedStroke(drawing.palette), renderer: drawing.renderer, interactive: false };
  for (const { id, geometry } of lines.features)
    if (drawing.isPicked(id)) leaflet.polyline(path(geometry.coordinates), style).addTo(group);
}

/** Clear of the square of the structure. */
const tickAtPx = 10;
const tickHalfPx = 4;
/** On a shorter span the ticks of both ends would run together. */
const leastSpanPx = 40;

/** A short tick across the span near the end where the damper sits; a planned one is hollow. */
function drawDamperTick(
  group: leaflet.LayerGroup,
  points: readonly [number, number][],
  damper: { side: 'from' | 'to'; isAsBuilt: boolean; drawing: LineDrawing },
): void {
  const [first, last] = damper.side === 'from' ? [points[0], points.at(-1)] : [points.at(-1), points[0]];
  if (first === undefined || last === undefined) return;
  const spanPx = damper.drawing.distancePx(first, last);
  if (spanPx < leastSpanPx) return;
  const tickAtRatio = tickAtPx / spanPx;
  const tickHalfRatio = tickHalfPx / spanPx;
  const latitudeScale = Math.cos((first[0] * Math.PI) / 180);
  const [north, east] = [last[0] - first[0], (last[1] - first[1]) * latitudeScale];
  const centre = [first[0] + north * tickAtRatio, first[1] + (east * tickAtRatio) / latitudeScale] as const;
  const across = [-east * tickHalfRatio, (north * tickHalfRatio) / latitudeScale] as const;
  const ends: [number, number][] = [
    [centre[0] - across[0], centre[1] - across[1]],
    [centre[0] + across[0], centre[1] + across[1]],
  ];
  const { palette, renderer } = damper.drawing;
  const style = { lineCap: 'butt', renderer, interactive: false } as const;
  leaflet.polyline(ends, { ...style, color: palette.ink, weight: 3 }).addTo(group);
  if (!damper.isAsBuilt) leaflet.polyline(ends, { ...style, color: palette.paper, weight: 1 }).addTo(group);
}

/** Structures as small footprints: dead-ends filled, suspensions open. */
export function drawStructures(group: leaflet.LayerGroup, structures: Structures): void {
  group.clearLayers();
  for (const { geometry, properties } of structures.features) {
    const icon = leaflet.divIcon({ className: `structure is-${properties.kind}`, iconSize: [9, 9] });
    const title = `Structure ${properties.name}, ${properties.kind}${properties.isAssumed ? ', assumed' : ''}`;
    leaflet.marker(latLng(geometry.coordinates), { icon, title, keyboard: false, interactive: false }).addTo(group);
  }
}

type GroundDrawing = Pick<LineDrawing, 'palette' | 'renderer'>;
type Rings = readonly (readonly (readonly (readonly number[])[])[])[];

/** Ground lies on a canvas of its own below the lines: on theirs, it would catch the clicks. */
function drawGround(group: leaflet.LayerGroup, polygons: Rings, style: leaflet.PolylineOptions): void {
  const rings = polygons.map((polygon) => polygon.map((ring) => path(ring)));
  leaflet.polygon(rings, { fillOpacity: 1, weight: 1, interactive: false, ...style }).addTo(group);
}

export function drawLand(group: leaflet.LayerGroup, polygons: Rings, { palette, renderer }: GroundDrawing): void {
  drawGround(group, polygons, { fillColor: palette.land, color: palette.landEdge, renderer });
}

export function drawTerrain(group: leaflet.LayerGroup, terrain: Terrain, { palette, renderer }: GroundDrawing): void {
  group.clearLayers();
  for (const { geometry, properties } of terrain.features) {
    const fillColor = terrainFill(properties.roughnessM, palette);
    drawGround(group, geometry.coordinates, { fillColor, color: palette.landEdge, renderer });
  }
}
