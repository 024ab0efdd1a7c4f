import { useDebounceFn, useMutationObserver } from '@vueuse/core';
import * as leaflet from 'leaflet';
import { computed, shallowRef, watch, type ComputedRef, type ShallowRef } from 'vue';
import { z } from 'zod';
import type { Grade } from '#shared/contract/grades.ts';
import { multiPolygonSchema } from '#shared/contract/map.ts';
import {
  drawLand,
  drawPicked,
  drawSections,
  drawSpans,
  drawStructures,
  drawTerrain,
  lineGroup,
  type LineDrawing,
} from './draw-layers.ts';
import { readMapPalette, type MapPalette } from './line-style.ts';
import { useMapSections, useMapSpans, useMapStructures, useMapTerrain } from './queries.ts';

export const nearFromZoom = 13;
const waitMs = 150;
/** Wider than what is seen, so that a small move needs no new request. */
const paddingRatio = 0.3;
const hitTolerancePx = 9;

interface Given {
  readonly grades: () => readonly Grade[];
  readonly picked: () => ReadonlySet<string>;
  /** Sections with a picked span, marked while single spans are not drawn. */
  readonly pickedSections: () => ReadonlySet<string>;
  readonly onSpan: (spanId: string) => void;
  readonly onSection: (sectionId: string) => void;
}

interface Groups {
  readonly land: leaflet.LayerGroup;
  readonly terrain: leaflet.LayerGroup;
  readonly picked: leaflet.LayerGroup;
  readonly sections: leaflet.LayerGroup;
  readonly spans: leaflet.LayerGroup;
  readonly structures: leaflet.LayerGroup;
}

function roundedBox(bounds: leaflet.LatLngBounds): string {
  return bounds
    .pad(paddingRatio)
    .toBBoxString()
    .split(',')
    .map((text) => Number(text).toFixed(3))
    .join(',');
}

const worldSchema = z.object({ features: z.array(z.object({ geometry: multiPolygonSchema })) });

async function drawWorld(group: leaflet.LayerGroup, palette: MapPalette, renderer: leaflet.Renderer): Promise<void> {
  const response = await fetch('/world-land.json');
  if (!response.ok) return;
  const world = worldSchema.parse(await response.json());
  group.clearLayers();
  for (const { geometry } of world.features) drawLand(group, geometry.coordinates, { palette, renderer });
}

const pickedPane = 'picked';
/** Above tiles (200) and below lines (400). */
const pickedPaneLevel = '390';

function makeGroups(instance: leaflet.Map, given: Given): Groups {
  instance.createPane(pickedPane).style.zIndex = pickedPaneLevel;
  const group = () => leaflet.layerGroup().addTo(instance);
  return {
    land: group(),
    terrain: group(),
    picked: group(),
    sections: lineGroup(given.onSection).addTo(instance),
    spans: lineGroup(given.onSpan).addTo(instance),
    structures: group(),
  };
}

/** Box to fetch single spans for; null while the map is too far out. */
function useNearBox(map: Readonly<ShallowRef<leaflet.Map | null>>) {
  const nearBox = shallowRef<string | null>(null);
  const look = useDebounceFn(() => {
    const instance = map.value;
    nearBox.value = instance !== null && instance.getZoom() >= nearFromZoom ? roundedBox(instance.getBounds()) : null;
  }, waitMs);
  watch(map, (instance) => {
    instance?.on('moveend zoomend', () => void look());
    void look();
  });
  return nearBox;
}

/** Colours of the theme that holds, read again when it changes. */
function useMapPalette(map: Readonly<ShallowRef<leaflet.Map | null>>) {
  const palette = shallowRef<MapPalette | null>(null);
  const read = () => {
    if (map.value !== null) palette.value = readMapPalette(map.value.getContainer());
  };
  watch(map, read);
  useMutationObserver(document.documentElement, read, { attributes: true, attributeFilter: ['data-theme'] });
  return palette;
}

type MapData = ReturnType<typeof useMapData>;

function useMapData(nearBox: Readonly<ShallowRef<string | null>>) {
  return {
    terrain: useMapTerrain().data,
    sections: useMapSections().data,
    spans: useMapSpans(nearBox).data,
    structures: useMapStructures(nearBox).data,
  };
}

interface Canvas {
  readonly map: Readonly<ShallowRef<leaflet.Map | null>>;
  readonly groups: ComputedRef<Groups | null>;
  readonly palette: Readonly<ShallowRef<MapPalette | null>>;
  readonly isNear: ComputedRef<boolean>;
}

/** Land and terrain, on a canvas below the lines; drawn again only when their colours change. */
function useGround({ groups, palette }: Canvas, { terrain }: MapData): void {
  const renderer = leaflet.canvas({ pane: 'tilePane' });
  watch([groups, palette], () => {
    if (groups.value === null || palette.value === null) return;
    // Without the outline the map is only plainer.
    void drawWorld(groups.value.land, palette.value, renderer).catch(() => undefined);
  });
  watch([groups, palette, terrain], () => {
    if (groups.value === null || palette.value === null || terrain.value === undefined) return;
    drawTerrain(groups.value.terrain, terrain.value, { palette: palette.value, renderer });
  });
}

/** Sections when far, spans and structures when near. */
function useLines({ map, groups, palette, isNear }: Canvas, data: MapData, given: Given): void {
  const renderer = leaflet.canvas({ tolerance: hitTolerancePx, padding: 0.5 });
  const distancePx = (from: [number, number], to: [number, number]) => {
    const instance = map.value;
    return instance === null ? 0 : instance.project(from).distanceTo(instance.project(to));
  };
  const drawing = computed((): LineDrawing | null =>
    palette.value === null ? null : { palette: palette.value, renderer, grades: given.grades(), distancePx },
  );
  watch([groups, drawing, data.sections, isNear], () => {
    if (groups.value === null || drawing.value === null) return;
    if (isNear.value) groups.value.sections.clearLayers();
    else if (data.sections.value !== undefined) drawSections(groups.value.sections, data.sections.value, drawing.value);
  });
  watch([groups, drawing, data.spans, isNear], () => {
    if (groups.value === null || drawing.value === null) return;
    if (!isNear.value) groups.value.spans.clearLayers();
    else if (data.spans.value !== undefined) drawSpans(groups.value.spans, data.spans.value, drawing.value);
  });
  watch([groups, data.structures, isNear], () => {
    if (groups.value === null) return;
    if (!isNear.value) groups.value.structures.clearLayers();
    else if (data.structures.value !== undefined) drawStructures(groups.value.structures, data.structures.value);
  });
}

/** Halos of what is picked: single spans when near, their sections when far. */
function usePickedMarks({ groups, palette, isNear }: Canvas, data: MapData, given: Given): void {
  const renderer = leaflet.canvas({ pane: pickedPane, padding: 0.5 });
  watch([groups, palette, isNear, data.sections, data.spans, given.picked, given.pickedSections], () => {
    if (groups.value === null || palette.value === null) return;
    const lines = isNear.value ? data.spans.value : data.sections.value;
    const ids = isNear.value ? given.picked() : given.pickedSections();
    if (lines === undefined) return;
    drawPicked(groups.value.picked, lines, { palette: palette.value, renderer, isPicked: (id) => ids.has(id) });
  });
}

/** Terrain, sections, spans and structures on the map; what is near enough is fetched by box, the rest once. */
export function useNetworkLayers(map: Readonly<ShallowRef<leaflet.Map | null>>, given: Given) {
  const nearBox = useNearBox(map);
  const isNear = computed(() => nearBox.value !== null);
  const data = useMapData(nearBox);
  const groups = computed(() => (map.value === null ? null : makeGroups(map.value, given)));
  const canvas: Canvas = { map, groups, palette: useMapPalette(map), isNear };
  useGround(canvas, data);
  useLines(canvas, data, given);
  usePickedMarks(canvas, data, given);
  const shown = computed(() => (isNear.value ? data.spans.value : data.sections.value));
  return { isNear, isTruncated: computed(() => shown.value?.isTruncated === true) };
}
