import type {
  AllergenReview,
  Ingredient,
  IngredientCategory,
  KnownBy,
  Pack,
} from '#shared/contracts/ingredient.ts';
import { ACID_KEYS, type AcidKey } from '#shared/physics/composition.ts';
import { textFromNumber } from './field-text.ts';

/** The ways a sugar content is told to the form; all end as g/L. */
export const SUGAR_ENTRIES = ['g/L', 'Brix', 'ratio by weight', 'ratio by volume'] as const;
export type SugarEntryKind = (typeof SUGAR_ENTRIES)[number];

export interface SugarEntry {
  kind: SugarEntryKind;
  gPerLText: string;
  brixText: string;
  sugarPartsText: string;
  waterPartsText: string;
}

export type KnownQuantity = 'abv' | 'sugar' | 'acid';
export const KNOWN_QUANTITIES: readonly KnownQuantity[] = ['abv', 'sugar', 'acid'];

export interface PackDraft {
  sizeText: string;
  sizeUnit: Pack['sizeUnit'];
  priceText: string;
  pricedOn: string;
}

/** An ingredient as the form holds it: every number as typed, so that nothing typed is lost. */
export interface IngredientDraft {
  name: string;
  category: IngredientCategory;
  abvPercentText: string;
  sugar: SugarEntry;
  acidTexts: Record<AcidKey, string>;
  densityText: string;
  knowledge: Record<KnownQuantity, { how: KnownBy; spreadPercentText: string }>;
  pieceMassText: string;
  allergens: AllergenReview;
  packs: PackDraft[];
  source: string;
  note: string;
}

export function emptyIngredientDraft(): IngredientDraft {
  return {
    name: '',
    category: 'other',
    abvPercentText: '0',
    sugar: sugarEntryFromGPerL(0),
    acidTexts: acidTexts(() => ''),
    densityText: '',
    knowledge: {
      abv: { how: 'estimate', spreadPercentText: '5' },
      sugar: { how: 'estimate', spreadPercentText: '10' },
      acid: { how: 'estimate', spreadPercentText: '10' },
    },
    pieceMassText: '',
    allergens: { reviewed: false, contains: [], mayContain: [] },
    packs: [],
    source: '',
    note: '',
  };
}

export function emptyPackDraft(): PackDraft {
  return { sizeText: '', sizeUnit: 'ml', priceText: '', pricedOn: '' };
}

/** The form's contents for a stored ingredient. */
export function draftFromIngredient(ingredient: Ingredient): IngredientDraft {
  const { composition, knowledge, allergens } = ingredient;
  const known = (quantity: KnownQuantity) => ({
    how: knowledge[quantity].how,
    spreadPercentText: textFromNumber(knowledge[quantity].spread * 100),
  });
  return {
    name: ingredient.name,
    category: ingredient.category,
    abvPercentText: textFromNumber(composition.abvFraction * 100),
    sugar: sugarEntryFromGPerL(composition.sugarGPerL),
    acidTexts: acidTexts((acid) => textOrEmpty(composition.acidsGPerL[acid] ?? null)),
    densityText: textOrEmpty(composition.densityGPerMl),
    knowledge: { abv: known('abv'), sugar: known('sugar'), acid: known('acid') },
    pieceMassText: textOrEmpty(ingredient.pieceMassG),
    allergens: {
      reviewed: allergens.reviewed,
      contains: [...allergens.contains],
      mayContain: [...allergens.mayContain],
    },
    packs: (ingredient.packs ?? []).map(draftFromPack),
    source: ingredient.source,
    note: ingredient.note,
  };
}

function draftFromPack(pack: Pack): PackDraft {
  return {
    sizeText: textFromNumber(pack.size),
    sizeUnit: pack.sizeUnit,
    priceText: pack.price ?? '',
    pricedOn: pack.pricedOn ?? '',
  };
}

function sugarEntryFromGPerL(sugarGPerL: number): SugarEntry {
  return {
    kind: 'g/L',
    gPerLText: textFromNumber(sugarGPerL),
    brixText: '',
    sugarPartsText: '1',
    waterPartsText: '1',
  };
}

function acidTexts(textOf: (acid: AcidKey) => string): Record<AcidKey, string> {
  return Object.fromEntries(ACID_KEYS.map((acid) => [acid, textOf(acid)])) as Record<AcidKey, string>;
}

function textOrEmpty(value: number | null): string {
  return value === null ? '' : textFromNumber(value);
}
