import { useDebounceFn, useMutationObserver } from '@vueuse/core';
import * as leaflet from 'leaflet';
import { computed, shallowRef, watch, type ShallowRef } from 'vue';
import { z } from 'zod';
import type { Grade } from '#shared/contract/grades.ts';
import { multiPolygonSchema } from '#shared/contract/map.ts';
import { drawLand, drawSections, drawSpans, drawStructures, drawTerrain, type LineDrawing } from './draw-layers.ts';
import { readMapPalette, type MapPalette } from './line-style.ts';
import { useMapSections, useMapSpans, useMapStructures, useMapTerrain } from './queries.ts';

export const nearFromZoom = 12;
const waitMs = 150;
/** Wider than what is seen, so that a small move needs no new request. */
const paddingRatio = 0.3;
const hitTolerancePx = 9;

interface Given {
  readonly grades: () => readonly Grade[];
  readonly picked: () => ReadonlySet<string>;
  readonly onSpan: (spanId: string) => void;
  readonly onSection: (sectionId: string) => void;
}

interface Groups {
  readonly land: leaflet.LayerGroup;
  readonly terrain: leaflet.LayerGroup;
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

function makeGroups(instance: leaflet.Map): Groups {
  const group = () => leaflet.layerGroup().addTo(instance);
  return { land: group(), terrain: group(), sections: group(), spans: group(), structures: group() };
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

/** Terrain, sections, spans and structures on the map; what is near enough is fetched by box, the rest once. */
export function useNetworkLayers(map: Readonly<ShallowRef<leaflet.Map | null>>, given: Given) {
  const palette = useMapPalette(map);
  const nearBox = useNearBox(map);
  const renderer = leaflet.canvas({ tolerance: hitTolerancePx, padding: 0.5 });
  const groundRenderer = leaflet.canvas({ pane: 'tilePane' });
  const [terrain, sections] = [useMapTerrain(), useMapSections()];
  const [spans, structures] = [useMapSpans(nearBox), useMapStructures(nearBox)];
  const isNear = computed(() => nearBox.value !== null);
  const groups = computed(() => (map.value === null ? null : makeGroups(map.value)));
  const drawing = computed((): LineDrawing | null => {
    if (palette.value === null) return null;
    const picked = given.picked();
    return {
      palette: palette.value,
      renderer,
      grades: given.grades(),
      isPicked: (id) => picked.has(id),
      onPick: given.onSpan,
    };
  });

  watch([groups, palette], () => {
    if (groups.value === null || palette.value === null) return;
    // Without the outline the map is only plainer.
    void drawWorld(groups.value.land, palette.value, groundRenderer).catch(() => undefined);
  });
  watch([groups, drawing, terrain.data], () => {
    if (groups.value === null || drawing.value === null || terrain.data.value === undefined) return;
    drawTerrain(groups.value.terrain, terrain.data.value, { palette: drawing.value.palette, renderer: groundRenderer });
  });
  watch([groups, drawing, sections.data, isNear], () => {
    if (groups.value === null || drawing.value === null || sections.data.value === undefined) return;
    if (isNear.value) groups.value.sections.clearLayers();
    else
      drawSections(groups.value.sections, sections.data.value, {
        ...drawing.value,
        isPicked: () => false,
        onPick: given.onSection,
      });
  });
  watch([groups, drawing, spans.data, structures.data, isNear], () => {
    if (groups.value === null || drawing.value === null) return;
    for (const group of [groups.value.spans, groups.value.structures]) if (!isNear.value) group.clearLayers();
    if (isNear.value && spans.data.value !== undefined) drawSpans(groups.value.spans, spans.data.value, drawing.value);
    if (isNear.value && structures.data.value !== undefined)
      drawStructures(groups.value.structures, structures.data.value);
  });
  return { isNear, isTruncated: computed(() => isNear.value && spans.data.value?.isTruncated === true) };
}
