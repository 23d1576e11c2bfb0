import type { IngredientWrite, Pack } from '#shared/contracts/ingredient.ts';
import type { FieldError } from '#shared/contracts/problem.ts';
import { ACID_KEYS, COMPOSITION_RANGES, type Composition } from '#shared/physics/composition.ts';
import { fitOfComposition } from '#shared/physics/contents.ts';
import { parseNumber } from '#shared/text/parse-number.ts';
import { type IngredientDraft, type KnownQuantity, type PackDraft } from './ingredient-draft.ts';
import { sugarGPerLFromEntry } from './sugar-entry.ts';

export type IngredientWriteResult = { ok: true; body: IngredientWrite } | { ok: false; errors: FieldError[] };

interface NumberField {
  text: string;
  pointer: string;
  /** How the field is called in the message. */
  name: string;
  min: number;
  max: number;
}

/** Said while typing, and again when the form is sent all the same. */
export const MISFIT_WORDS =
  'So much alcohol, sugar and acid does not fit into one litre together. Check the values, or the density.';

const PRICE = /^\d{1,9}(\.\d{1,4})?$/;
const MAX_PACK_SIZE = 1_000_000;
const MAX_PIECE_G = 10_000;
const PERCENT = 100;

/** Reads fields one by one and gathers what is wrong, under the pointers the server uses too. */
class FieldReader {
  readonly errors: FieldError[] = [];

  refuse(pointer: string, detail: string): void {
    this.errors.push({ pointer, code: 'invalid', detail });
  }

  number(field: NumberField): number {
    const parsed = parseNumber(field.text, { min: field.min, max: field.max });
    if (parsed.ok) return parsed.value;
    const asked =
      parsed.reason === 'ambiguous' ? parsed.detail : `a number from ${field.min} to ${field.max}.`;
    this.refuse(field.pointer, `${field.name}: ${asked}`);
    return field.min;
  }

  numberOrNull(field: NumberField): number | null {
    return field.text.trim() === '' ? null : this.number(field);
  }
}

/** What the draft says of the composition; null while a field of it cannot be read. */
export function compositionFromDraft(draft: IngredientDraft): Composition | null {
  const reader = new FieldReader();
  const composition = readComposition(reader, draft);
  return reader.errors.length > 0 ? null : composition;
}

/** The ingredient to be saved, or every field that needs another value. */
export function ingredientFromDraft(draft: IngredientDraft): IngredientWriteResult {
  const reader = new FieldReader();
  const name = draft.name.trim();
  if (name === '') reader.refuse('#/name', 'Name: give the ingredient a name.');
  const body: IngredientWrite = {
    name,
    category: draft.category,
    composition: readComposition(reader, draft),
    knowledge: {
      abv: readKnowledge(reader, draft, 'abv'),
      sugar: readKnowledge(reader, draft, 'sugar'),
      acid: readKnowledge(reader, draft, 'acid'),
    },
    pieceMassG: readPieceMass(reader, draft.pieceMassText),
    allergens: draft.allergens,
    packs: draft.packs.map((pack, index) => readPack(reader, pack, index)),
    source: draft.source.trim(),
    note: draft.note.trim(),
  };
  if (reader.errors.length === 0 && !fitOfComposition(body.composition).ok) {
    reader.refuse('#/composition', MISFIT_WORDS);
  }
  return reader.errors.length > 0 ? { ok: false, errors: reader.errors } : { ok: true, body };
}

function readComposition(reader: FieldReader, draft: IngredientDraft): IngredientWrite['composition'] {
  const abvPercent = reader.number({
    text: draft.abvPercentText,
    pointer: '#/composition/abvFraction',
    name: 'Alcohol',
    min: 0,
    max: COMPOSITION_RANGES.abvFraction.max * PERCENT,
  });
  const sugar = sugarGPerLFromEntry(draft.sugar);
  if (!sugar.ok) reader.refuse('#/composition/sugarGPerL', sugar.detail);
  return {
    abvFraction: abvPercent / PERCENT,
    sugarGPerL: sugar.ok ? sugar.sugarGPerL : 0,
    acidsGPerL: readAcids(reader, draft),
    densityGPerMl: reader.numberOrNull({
      text: draft.densityText,
      pointer: '#/composition/densityGPerMl',
      name: 'Density',
      ...COMPOSITION_RANGES.densityGPerMl,
    }),
  };
}

/** Only the acids that are there: an empty field and a 0 both mean absent. */
function readAcids(
  reader: FieldReader,
  draft: IngredientDraft,
): IngredientWrite['composition']['acidsGPerL'] {
  const acids: IngredientWrite['composition']['acidsGPerL'] = {};
  for (const acid of ACID_KEYS) {
    const concentration = reader.numberOrNull({
      text: draft.acidTexts[acid],
      pointer: `#/composition/acidsGPerL/${acid}`,
      name: `${acid} acid`,
      ...COMPOSITION_RANGES.acidGPerL,
    });
    if (concentration !== null && concentration > 0) acids[acid] = concentration;
  }
  return acids;
}

function readKnowledge(reader: FieldReader, draft: IngredientDraft, quantity: KnownQuantity) {
  const { how, spreadPercentText } = draft.knowledge[quantity];
  const spreadPercent = reader.number({
    text: spreadPercentText,
    pointer: `#/knowledge/${quantity}/spread`,
    name: 'Spread',
    min: 0,
    max: PERCENT,
  });
  return { how, spread: spreadPercent / PERCENT };
}

function readPieceMass(reader: FieldReader, text: string): number | null {
  const massG = reader.numberOrNull({
    text,
    pointer: '#/pieceMassG',
    name: 'Mass of a piece',
    min: 0,
    max: MAX_PIECE_G,
  });
  if (massG === 0) reader.refuse('#/pieceMassG', 'Mass of a piece: more than 0, or leave it empty.');
  return massG;
}

function readPack(reader: FieldReader, pack: PackDraft, index: number): Pack {
  const pointer = (member: string) => `#/packs/${index}/${member}`;
  const size = reader.number({
    text: pack.sizeText,
    pointer: pointer('size'),
    name: 'Size',
    min: 0,
    max: MAX_PACK_SIZE,
  });
  if (size === 0 && pack.sizeText.trim() !== '') reader.refuse(pointer('size'), 'Size: more than 0.');
  const price = pack.priceText.trim().replace(',', '.');
  if (price !== '' && !PRICE.test(price)) {
    reader.refuse(pointer('price'), 'Price: an amount such as 18.50, or empty while it is not known.');
  }
  return {
    size,
    sizeUnit: pack.sizeUnit,
    price: price === '' ? null : price,
    pricedOn: pack.pricedOn === '' ? null : pack.pricedOn,
  };
}
