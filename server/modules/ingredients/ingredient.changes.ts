import type { IngredientWrite } from '#shared/contracts/ingredient.ts';
import { ACID_KEYS } from '#shared/physics/composition.ts';
import { canonicalJson } from '../../db/canonical-json.ts';
import { formatAbv, formatDensity, formatGPerL, formatMass } from '#shared/text/format-quantity.ts';

/** What differs between two states of an ingredient, in words for the history; null when nothing does. */
export function describeIngredientChange(before: IngredientWrite, after: IngredientWrite): string | null {
  const words = textPairs(before, after)
    .filter(([, was, is]) => was !== is)
    .map(([field, was, is]) => `${field} ${was} → ${is}`);
  const others = wholePairs(before, after)
    .filter(([, was, is]) => canonicalJson(was) !== canonicalJson(is))
    .map(([field]) => `${field} changed`);
  const all = [...words, ...others];
  if (all.length > 0) return `${after.name}: ${all.join(', ')}`;
  return canonicalJson(before) === canonicalJson(after)
    ? null
    : `${after.name}: a value changed in its last digits`;
}

function textPairs(before: IngredientWrite, after: IngredientWrite): [string, string, string][] {
  const acids = ACID_KEYS.map((acid): [string, string, string] => [
    `${acid} acid`,
    formatGPerL(before.composition.acidsGPerL[acid] ?? 0),
    formatGPerL(after.composition.acidsGPerL[acid] ?? 0),
  ]);
  return [
    ['name', before.name, after.name],
    ['category', before.category, after.category],
    ['strength', formatAbv(before.composition.abvFraction), formatAbv(after.composition.abvFraction)],
    ['sugar', formatGPerL(before.composition.sugarGPerL), formatGPerL(after.composition.sugarGPerL)],
    ...acids,
    ['density', densityText(before), densityText(after)],
    ['one piece', pieceText(before), pieceText(after)],
    ['allergens', allergenText(before), allergenText(after)],
  ];
}

function wholePairs(before: IngredientWrite, after: IngredientWrite): [string, unknown, unknown][] {
  return [
    ['how it is known', before.knowledge, after.knowledge],
    ['packs', before.packs, after.packs],
    ['source', before.source, after.source],
    ['note', before.note, after.note],
  ];
}

function densityText({ composition }: IngredientWrite): string {
  return composition.densityGPerMl === null ? 'computed' : formatDensity(composition.densityGPerMl);
}

function pieceText({ pieceMassG }: IngredientWrite): string {
  return pieceMassG === null ? 'not weighed' : formatMass(pieceMassG);
}

function allergenText({ allergens }: IngredientWrite): string {
  if (!allergens.reviewed) return 'not reviewed';
  const listed = [...allergens.contains, ...allergens.mayContain.map((name) => `may contain ${name}`)];
  return listed.length === 0 ? 'reviewed, none' : listed.join(' + ');
}
