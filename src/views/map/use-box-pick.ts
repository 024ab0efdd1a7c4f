import * as leaflet from 'leaflet';
import { onScopeDispose, shallowRef, watch, type ShallowRef } from 'vue';

const smallestPx = 6;

/** Draws a box on the map with the box tool or with Shift held, and says which box was drawn. */
export function useBoxPick(
  map: Readonly<ShallowRef<leaflet.Map | null>>,
  onBox: (bounds: leaflet.LatLngBounds) => void,
) {
  const isBoxTool = shallowRef(false);
  // An SVG lets clicks through; another canvas above the lines would swallow them.
  const renderer = leaflet.svg();
  let rectangle: leaflet.Rectangle | null = null;
  let from: leaflet.LatLng | null = null;

  function begin(event: leaflet.LeafletMouseEvent): void {
    const instance = map.value;
    if (instance === null || (!isBoxTool.value && !event.originalEvent.shiftKey)) return;
    from = event.latlng;
    instance.dragging.disable();
    rectangle = leaflet
      .rectangle(leaflet.latLngBounds(from, from), { className: 'pick-box', interactive: false, renderer })
      .addTo(instance);
  }

  function move(event: leaflet.LeafletMouseEvent): void {
    if (from !== null) rectangle?.setBounds(leaflet.latLngBounds(from, event.latlng));
  }

  function end(event: leaflet.LeafletMouseEvent): void {
    const instance = map.value;
    if (from === null || instance === null) return;
    const bounds = leaflet.latLngBounds(from, event.latlng);
    const sizePx = instance.latLngToContainerPoint(from).distanceTo(instance.latLngToContainerPoint(event.latlng));
    from = null;
    rectangle?.remove();
    rectangle = null;
    isBoxTool.value = false;
    instance.dragging.enable();
    if (sizePx >= smallestPx) onBox(bounds);
  }

  const stop = watch(map, (instance) => {
    if (instance === null) return;
    instance.boxZoom.disable();
    instance.on('mousedown', begin).on('mousemove', move).on('mouseup', end);
  });
  watch(isBoxTool, (isOn) => map.value?.getContainer().classList.toggle('is-boxing', isOn));
  onScopeDispose(stop);
  return { isBoxTool };
}
