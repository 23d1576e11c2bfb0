import { enableAutoUnmount, mount } from '@vue/test-utils';
import { createPinia } from 'pinia';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';

import DisplaySwitches from '#src/components/frame/DisplaySwitches.vue';
import { PREFERENCES_KEY, usePreferencesStore } from '#src/stores/preferences.ts';
import { byRole } from '#tests/support/by-role.ts';

enableAutoUnmount(afterEach);
beforeEach(() => localStorage.clear());

/** As a page that has just been loaded. */
function freshPage() {
  const pinia = createPinia();
  const wrapper = mount(DisplaySwitches, { attachTo: document.body, global: { plugins: [pinia] } });
  return { wrapper, preferences: usePreferencesStore(pinia) };
}

function isChosen(name: string): boolean {
  return byRole<HTMLInputElement>(document.body, 'radio', name).checked;
}

describe('the display switches', () => {
  it('start with millilitres and Celsius', () => {
    freshPage();
    expect(isChosen('Millilitres')).toBe(true);
    expect(isChosen('Degrees Celsius')).toBe(true);
  });

  it('stay as they were set when the page is loaded again', () => {
    const { wrapper } = freshPage();
    byRole(document.body, 'radio', 'Fluid ounces').click();
    byRole(document.body, 'radio', 'Degrees Fahrenheit').click();
    byRole(document.body, 'radio', 'Dark theme').click();
    wrapper.unmount();

    const { preferences } = freshPage();
    expect(isChosen('Fluid ounces')).toBe(true);
    expect(isChosen('Degrees Fahrenheit')).toBe(true);
    expect(isChosen('Dark theme')).toBe(true);
    expect(preferences.theme).toBe('dark');
  });

  it("store no theme before one is chosen, so that the device's own is followed", () => {
    freshPage();
    byRole(document.body, 'radio', 'Fluid ounces').click();
    expect(JSON.parse(localStorage.getItem(PREFERENCES_KEY) ?? '')).toEqual({
      volumeUnit: 'oz',
      temperatureUnit: 'C',
    });
  });

  it.each(['{"volumeUnit":"hogshead","theme":7}', 'null', '[1', '"oz"'])(
    'take %s in the storage for nothing',
    (stored) => {
      localStorage.setItem(PREFERENCES_KEY, stored);
      const { preferences } = freshPage();
      expect(preferences.volumeUnit).toBe('ml');
      expect(['light', 'dark']).toContain(preferences.theme);
    },
  );
});
