import { computed } from 'vue';
import type { ComputedRef } from 'vue';
import { formatNumber, formatQuantity } from '#shared/units/format-quantity.ts';
import type { QuantityKind } from '#shared/units/quantity-kinds.ts';
import { convertQuantity, unitLabel } from '#shared/units/quantity-kinds.ts';
import type { ChartScale } from '#src/components/chart/chart-scale.ts';
import { usePreferencesStore } from '#src/stores/preferences.ts';

export interface QuantityText {
  /** Number with its unit, in the units of the reader. */
  readonly text: (kind: QuantityKind, value: number | null) => string;
  /** How numbers of a kind are shown along an axis. */
  readonly scale: (kind: QuantityKind) => ChartScale;
}

/** Text of quantities where a component cannot stand: in labels, drawings and charts. Follows the reader's units. */
export function useQuantityText(): QuantityText {
  const preferences = usePreferencesStore();
  return {
    text: (kind, value) => formatQuantity(value, kind, { system: preferences.unitSystem }),
    scale: (kind) => {
      const system = preferences.unitSystem;
      return {
        unit: unitLabel(kind, system),
        shown: (value) => convertQuantity(value, kind, system),
        format: (shownValue) => formatNumber(shownValue),
      };
    },
  };
}

/** Scales of several kinds by name, made anew when the reader changes units. */
export function useQuantityScales<K extends string>(
  kinds: Readonly<Record<K, QuantityKind>>,
): ComputedRef<Record<K, ChartScale>> {
  const { scale } = useQuantityText();
  return computed(() => {
    const entries = Object.entries<QuantityKind>(kinds).map(([name, kind]) => [name, scale(kind)] as const);
    return Object.fromEntries(entries) as Record<K, ChartScale>; // fromEntries forgets the names it was given
  });
}
