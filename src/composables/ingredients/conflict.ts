import { ACID_KEYS } from '#shared/physics/composition.ts';
import { type IngredientDraft, type SugarEntry, KNOWN_QUANTITIES } from './ingredient-draft.ts';

/** A part of the form in which the two states differ, each told in words. */
export interface ConflictRow {
  part: keyof IngredientDraft;
  label: string;
  mine: string;
  theirs: string;
}

const LABELS: Readonly<Record<keyof IngredientDraft, string>> = {
  name: 'Name',
  category: 'Category',
  abvPercentText: 'Alcohol',
  sugar: 'Sugar',
  acidTexts: 'Acids',
  densityText: 'Density',
  knowledge: 'How the values are known',
  pieceMassText: 'Mass of a piece',
  allergens: 'Allergens',
  packs: 'Packs and prices',
  source: 'Source',
  note: 'Note',
};

/** What differs between what the person wrote and what somebody else saved meanwhile. */
export function conflictRows(mine: IngredientDraft, theirs: IngredientDraft): ConflictRow[] {
  const parts = Object.keys(LABELS) as (keyof IngredientDraft)[];
  return parts
    .map((part) => ({
      part,
      label: LABELS[part],
      mine: partWords(mine, part),
      theirs: partWords(theirs, part),
    }))
    .filter((row) => row.mine !== row.theirs);
}

/** The person's draft with the named parts taken from the other state. */
export function mergeDrafts(input: {
  mine: IngredientDraft;
  theirs: IngredientDraft;
  takeTheirs: readonly (keyof IngredientDraft)[];
}): IngredientDraft {
  const taken = Object.fromEntries(input.takeTheirs.map((part) => [part, input.theirs[part]]));
  return { ...input.mine, ...taken };
}

function partWords(draft: IngredientDraft, part: keyof IngredientDraft): string {
  return describePart(draft, part) || 'empty';
}

function describePart(draft: IngredientDraft, part: keyof IngredientDraft): string {
  switch (part) {
    case 'abvPercentText':
      return `${draft.abvPercentText} %`;
    case 'sugar':
      return sugarWords(draft.sugar);
    case 'acidTexts':
      return ACID_KEYS.filter((acid) => Number(draft.acidTexts[acid]) !== 0)
        .map((acid) => `${acid} ${draft.acidTexts[acid]} g/L`)
        .join(', ');
    case 'densityText':
      return draft.densityText === '' ? 'computed' : `${draft.densityText} g/mL`;
    case 'knowledge':
      return KNOWN_QUANTITIES.map((quantity) => {
        const { how, spreadPercentText } = draft.knowledge[quantity];
        return `${quantity} ${how} ±${spreadPercentText} %`;
      }).join(', ');
    case 'pieceMassText':
      return draft.pieceMassText === '' ? '' : `${draft.pieceMassText} g`;
    case 'allergens':
      return allergenWordsOf(draft);
    case 'packs':
      return draft.packs
        .map((pack) =>
          [`${pack.sizeText} ${pack.sizeUnit}`, pack.priceText, pack.pricedOn].filter(Boolean).join(', '),
        )
        .join('; ');
    default:
      return draft[part];
  }
}

function allergenWordsOf({ allergens }: IngredientDraft): string {
  return [
    allergens.reviewed ? 'reviewed' : 'not reviewed',
    ...[...allergens.contains].sort().map((allergen) => `contains ${allergen}`),
    ...[...allergens.mayContain].sort().map((allergen) => `may contain ${allergen}`),
  ].join(', ');
}

function sugarWords(sugar: SugarEntry): string {
  switch (sugar.kind) {
    case 'g/L':
      return `${sugar.gPerLText} g/L`;
    case 'Brix':
      return `${sugar.brixText} °Bx`;
    default:
      return `${sugar.sugarPartsText} : ${sugar.waterPartsText} ${sugar.kind.replace('ratio ', '')}`;
  }
}
