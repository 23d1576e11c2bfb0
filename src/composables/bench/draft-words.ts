/** Drafts in words, for two people who saved different ones: drafts may be unfinished, so nothing is worked out. */
import type { DraftBody, DraftLine } from '#shared/contracts/spec.ts';
import { formatMass, formatPercent } from '#shared/text/format-quantity.ts';
import { isBlankLine } from '#shared/specs/line-amount.ts';

export interface DraftNames {
  readonly ingredient: (ingredientId: string) => string;
  readonly glass: (glassId: string) => string;
}

export interface DraftRow {
  readonly key: string;
  readonly words: string;
  /** Whether the other draft does not have it like this. */
  readonly differs: boolean;
}

export interface DraftInWords {
  readonly lines: readonly DraftRow[];
  readonly making: readonly DraftRow[];
}

/** `22.5 ml lime juice, topped up after (fresh)`. */
export function lineWords(line: DraftLine, names: DraftNames): string {
  const name = line.ingredientId === null ? 'no ingredient yet' : names.ingredient(line.ingredientId);
  const amount = line.amountText.trim() === '' ? 'no amount yet' : line.amountText.trim();
  const stage = line.stage === 'top' ? ', topped up after' : '';
  const note = line.note.trim() === '' ? '' : ` (${line.note.trim()})`;
  return `${amount} ${name}${stage}${note}`;
}

function dilutionWords(dilution: DraftBody['dilution']): string {
  switch (dilution.kind) {
    case 'published':
      return 'published curve';
    case 'weighed':
      return `weighed, ${formatMass(dilution.massBeforeG)} in and ${formatMass(dilution.massAfterG)} strained`;
    case 'by hand':
      return `set by hand, ${formatPercent(dilution.dilutionFraction)}`;
    case 'none':
      return 'none';
  }
}

function makingRows(draft: DraftBody, names: DraftNames): [key: string, words: string][] {
  const { glassIce, build } = draft;
  const steps = build.filter((step) => step.trim() !== '');
  return [
    ['method', `method: ${draft.method}`],
    ['dilution', `dilution: ${dilutionWords(draft.dilution)}`],
    ['ice', `ice to mix with: ${draft.ice}`],
    ['glass', `glass: ${draft.glassId === null ? 'none chosen' : names.glass(draft.glassId)}`],
    [
      'glass-ice',
      `ice in the glass: ${glassIce.kind === 'none' ? 'none' : `${glassIce.kind}, ${formatMass(glassIce.massG)}`}`,
    ],
    ['garnish', `garnish: ${draft.garnish.trim() || 'none'}`],
    ['part', `one part: ${draft.partMl} ml`],
    ['build', steps.length === 0 ? 'no build steps' : `build: ${steps.join(' / ')}`],
  ];
}

/** One of two drafts, with what the other does not have marked. */
export function draftInWords(input: {
  readonly draft: DraftBody;
  readonly other: DraftBody;
  readonly names: DraftNames;
}): DraftInWords {
  const { draft, other, names } = input;
  const otherLines = new Set(other.lines.map((line) => lineWords(line, names)));
  const otherMaking = new Map(makingRows(other, names));
  return {
    lines: draft.lines
      .filter((line) => !isBlankLine(line))
      .map((line) => {
        const words = lineWords(line, names);
        return { key: line.id, words, differs: !otherLines.has(words) };
      }),
    making: makingRows(draft, names).map(([key, words]) => ({
      key,
      words,
      differs: otherMaking.get(key) !== words,
    })),
  };
}

/** Lines of one draft that the other does not have like this. */
export function linesNotIn(input: { readonly draft: DraftBody; readonly other: DraftBody }): DraftLine[] {
  const said = (line: DraftLine): string =>
    JSON.stringify([line.ingredientId, line.amountText.trim(), line.stage, line.note.trim()]);
  const others = new Set(input.other.lines.map(said));
  return input.draft.lines.filter((line) => !isBlankLine(line) && !others.has(said(line)));
}
