import type { DilutionChoice } from '#shared/contracts/spec.ts';
import type { Version } from '#shared/contracts/version.ts';
import { formatMass, type VolumeUnit } from '#shared/text/format-quantity.ts';
import { showAmountIn } from '#shared/text/show-amount.ts';

/** One line as it is read at the bar. */
export interface SheetLine {
  id: string;
  /** For one serve. */
  amount: string;
  /** For all serves; null when one serve is made. */
  amountForAll: string | null;
  ingredient: string;
  note: string;
  isTop: boolean;
}

/** A name and its value in words. */
export interface WordsRow {
  label: string;
  words: string;
}

/** The lines of a version, amount first, for one serve and for several. */
export function sheetLines(input: {
  version: Pick<Version, 'body' | 'ingredients'>;
  serves: number;
  volumeUnit: VolumeUnit;
}): SheetLine[] {
  const { version, serves, volumeUnit } = input;
  const names = new Map(version.ingredients.map((ingredient) => [ingredient.id, ingredient.name]));
  return version.body.lines.map((line) => ({
    id: line.id,
    amount: showAmountIn(line.amount, volumeUnit),
    amountForAll:
      serves === 1
        ? null
        : showAmountIn({ unit: line.amount.unit, value: line.amount.value * serves }, volumeUnit),
    ingredient: names.get(line.ingredientId) ?? 'an ingredient that is not recorded',
    note: line.note,
    isTop: line.stage === 'top',
  }));
}

/** How the drink is made and served, without its build steps. */
export function makingWords(version: Pick<Version, 'body' | 'glass'>): WordsRow[] {
  const { body, glass } = version;
  return [
    { label: 'Method', words: body.method },
    { label: 'Ice to mix with', words: body.ice },
    { label: 'Dilution', words: dilutionWords(body.dilution) },
    { label: 'Glass', words: glass?.name ?? 'not chosen' },
    { label: 'Ice in the glass', words: glassIceWords(body.glassIce) },
    { label: 'Garnish', words: body.garnish || 'none' },
  ];
}

/** Where the melt water comes from; how much it is stands among the figures. */
export function dilutionWords(dilution: DilutionChoice): string {
  switch (dilution.kind) {
    case 'none':
      return 'none';
    case 'weighed':
      return `weighed: ${formatMass(dilution.massBeforeG)} in, ${formatMass(dilution.massAfterG)} out`;
    case 'by hand':
      return 'set by hand';
    case 'published':
      return 'published curve of the method';
  }
}

function glassIceWords(ice: Version['body']['glassIce']): string {
  if (ice.kind === 'none') return 'none';
  return ice.massG > 0 ? `${ice.kind}, ${formatMass(ice.massG)}` : ice.kind;
}
