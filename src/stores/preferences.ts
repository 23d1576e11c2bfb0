import { usePreferredDark } from '@vueuse/core';
import { defineStore } from 'pinia';
import { computed, ref, watch } from 'vue';

export type Theme = 'light' | 'dark';
export type VolumeUnit = 'ml' | 'oz';
export type TemperatureUnit = 'C' | 'F';

/** The key that public/theme.js reads before the first paint. */
export const PREFERENCES_KEY = 'oxymel.preferences';

/** How this browser shows things. Kept in the browser, not in the account: a phone behind a bar is its own place. */
export const usePreferencesStore = defineStore('preferences', () => {
  const stored = readStored();
  const chosenTheme = ref<Theme | null>(oneOfOr(stored['theme'], ['light', 'dark'] as const, null));
  const volumeUnit = ref<VolumeUnit>(oneOfOr(stored['volumeUnit'], ['ml', 'oz'] as const, 'ml'));
  const temperatureUnit = ref<TemperatureUnit>(oneOfOr(stored['temperatureUnit'], ['C', 'F'] as const, 'C'));
  const lastTeamId = ref<string | null>(
    typeof stored['lastTeamId'] === 'string' ? stored['lastTeamId'] : null,
  );

  const prefersDark = usePreferredDark();
  /** The chosen theme, or the device's until one is chosen. */
  const theme = computed<Theme>(() => chosenTheme.value ?? (prefersDark.value ? 'dark' : 'light'));

  watch(
    [chosenTheme, volumeUnit, temperatureUnit, lastTeamId],
    () =>
      writeStored({
        ...(chosenTheme.value !== null && { theme: chosenTheme.value }),
        volumeUnit: volumeUnit.value,
        temperatureUnit: temperatureUnit.value,
        ...(lastTeamId.value !== null && { lastTeamId: lastTeamId.value }),
      }),
    { flush: 'sync' },
  );

  return {
    theme,
    volumeUnit,
    temperatureUnit,
    lastTeamId,
    setTheme: (value: Theme) => (chosenTheme.value = value),
    setVolumeUnit: (value: VolumeUnit) => (volumeUnit.value = value),
    setTemperatureUnit: (value: TemperatureUnit) => (temperatureUnit.value = value),
    setLastTeam: (teamId: string | null) => (lastTeamId.value = teamId),
  };
});

function oneOfOr<Word extends string, Fallback>(
  value: unknown,
  words: readonly Word[],
  fallback: Fallback,
): Word | Fallback {
  return words.find((word) => word === value) ?? fallback;
}

/** Storage may be switched off, full or hold anything: then the defaults stand. */
function readStored(): Record<string, unknown> {
  try {
    const parsed: unknown = JSON.parse(localStorage.getItem(PREFERENCES_KEY) ?? '{}');
    return typeof parsed === 'object' && parsed !== null ? { ...parsed } : {};
  } catch {
    return {};
  }
}

function writeStored(preferences: Record<string, string>): void {
  try {
    localStorage.setItem(PREFERENCES_KEY, JSON.stringify(preferences));
  } catch {
    // Without storage the choice lasts as long as the page.
  }
}
