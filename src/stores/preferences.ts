import { useLocalStorage } from '@vueuse/core';
import { defineStore } from 'pinia';
import type { UnitSystem } from '#shared/units/quantity-kinds.ts';

export const themeChoices = ['system', 'light', 'dark', 'sun'] as const;
export type ThemeChoice = (typeof themeChoices)[number];

/** What a person likes on this device. */
export const usePreferencesStore = defineStore('preferences', () => ({
  unitSystem: useLocalStorage<UnitSystem>('stillspan-units', 'metric'),
  theme: useLocalStorage<ThemeChoice>('stillspan-theme', 'system'),
}));
