import { onMounted, shallowReadonly, shallowRef } from 'vue';
import type { Ref, ShallowRef } from 'vue';
import { useMutationObserver } from '@vueuse/core';
import type { ChartPalette } from './chart-palette.ts';
import { readChartPalette } from './chart-palette.ts';

/**
 * Colours that hold at an element, read again when the theme changes: a canvas, unlike the rest of the page, does not
 * follow custom properties by itself. Null until the element is mounted.
 */
export function useChartPalette(element: Readonly<Ref<HTMLElement | null>>): Readonly<ShallowRef<ChartPalette | null>> {
  const palette = shallowRef<ChartPalette | null>(null);
  function read(): void {
    if (element.value !== null) palette.value = readChartPalette(element.value);
  }
  onMounted(() => {
    read();
    // Letters drawn before the typeface has come stay in the substitute until the next drawing.
    void document.fonts?.load('12px Roboto').then(read);
  });
  useMutationObserver([document.documentElement, document.body], read, {
    attributes: true,
    attributeFilter: ['class', 'data-theme'],
  });
  return shallowReadonly(palette);
}
