import { STANDARD_DRINK_PLACES } from '#shared/physics/data/standard-drinks.ts';

/** Places whose standard drink is known, named in the browser's language and sorted by name. */
export function placeOptions(): { value: (typeof STANDARD_DRINK_PLACES)[number]; label: string }[] {
  const names = new Intl.DisplayNames(undefined, { type: 'region' });
  return STANDARD_DRINK_PLACES.map((value) => ({
    value,
    label: value === 'WHO' ? 'World Health Organization' : (names.of(value) ?? value),
  })).sort((a, b) => a.label.localeCompare(b.label));
}
