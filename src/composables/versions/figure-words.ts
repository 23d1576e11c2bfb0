import type { Figures } from '#shared/contracts/version.ts';
import { STANDARD_DRINKS, type StandardDrinkPlace } from '#shared/physics/data/standard-drinks.ts';
import { standardDrinks } from '#shared/physics/standard-drinks.ts';
import { figureDifferences } from '#shared/specs/figure-differences.ts';
import { type ShownUnits, formatFigure } from '#shared/text/format-figure.ts';
import { formatStandardDrinks } from '#shared/text/format-quantity.ts';
import type { WordsRow } from './sheet-words.ts';

/** The figures of one drink in words, in the order they are always shown; what it does not have is left out. */
export function figureWords(figures: Figures, units: ShownUnits): WordsRow[] {
  return figureDifferences([figures]).flatMap(({ figure, label, cells }) => {
    const value = cells[0]?.value ?? null;
    return value === null ? [] : [{ label, words: formatFigure({ figure, value, ...units }) }];
  });
}

/** Strength as the team's country counts it; an estimate, not a declaration. */
export function standardDrinkWords(figures: Figures, place: StandardDrinkPlace): WordsRow {
  const { name, unit } = STANDARD_DRINKS[place];
  const count = standardDrinks({ ethanolG: figures.ethanolG, place });
  return { label: `${unit}s, ${name} (estimate)`, words: formatStandardDrinks(count) };
}
