import { usePreferredDark } from '@vueuse/core';
import { Dark } from 'quasar';
import { computed, watchEffect } from 'vue';
import { usePreferencesStore } from '#src/stores/preferences.ts';

/** Puts the chosen theme on the page, for our tokens and for Quasar. */
export function useTheme(): void {
  const preferences = usePreferencesStore();
  const prefersDark = usePreferredDark();
  const theme = computed(() =>
    preferences.theme === 'system' ? (prefersDark.value ? 'dark' : 'light') : preferences.theme,
  );
  watchEffect(() => {
    document.documentElement.dataset['theme'] = theme.value;
    Dark.set(theme.value === 'dark');
  });
}
