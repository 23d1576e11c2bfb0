import { acidAsCitric } from '#shared/physics/acids.ts';
import { computedDensityGPerMl, fitOfComposition } from '#shared/physics/contents.ts';
import { formatDensity, formatGPerL } from '#shared/text/format-quantity.ts';
import type { IngredientDraft } from './ingredient-draft.ts';
import { MISFIT_WORDS, compositionFromDraft } from './ingredient-write.ts';

export interface DraftFigures {
  /** All acids together as citric; null while a field cannot be read. */
  acidTotalWords: string | null;
  /** Density that follows from the rest; null while a field cannot be read or the parts do not fit together. */
  computedDensityWords: string | null;
  /** What keeps the parts from fitting into a litre together; null when they fit. */
  misfitWords: string | null;
}

/** What follows from the fields as they stand, shown while one types. */
export function draftFigures(draft: IngredientDraft): DraftFigures {
  const composition = compositionFromDraft(draft);
  if (composition === null) return { acidTotalWords: null, computedDensityWords: null, misfitWords: null };
  const acidTotalWords = formatGPerL(acidAsCitric(composition.acidsGPerL));
  const computed = { ...composition, densityGPerMl: null };
  const isFitting = fitOfComposition(composition).ok;
  return {
    acidTotalWords,
    computedDensityWords: fitOfComposition(computed).ok
      ? formatDensity(computedDensityGPerMl(computed))
      : null,
    misfitWords: isFitting ? null : MISFIT_WORDS,
  };
}
