import type { Note, Version } from '#shared/contracts/version.ts';
import type { StandardDrinkPlace } from '#shared/physics/data/standard-drinks.ts';
import { type AlignedCell, type AlignedLine, alignLines } from '#shared/specs/align-lines.ts';
import { amountDifference } from '#shared/specs/amount-difference.ts';
import { type FigureDifference, figureDifferences } from '#shared/specs/figure-differences.ts';
import { summariseNotes } from '#shared/specs/note-summary.ts';
import { type ShownUnits, formatFigure, formatFigureDifference } from '#shared/text/format-figure.ts';
import { formatTrimmed } from '#shared/text/format-number.ts';
import { type VolumeUnit, formatMass, formatVolume } from '#shared/text/format-quantity.ts';
import { showAmountIn } from '#shared/text/show-amount.ts';
import type { AmountMeasure } from '#shared/units/amount.ts';
import { allergenWords } from './allergen-words.ts';
import {
  type CompareCell,
  type CompareRow,
  type CompareSection,
  type Standing,
  compareRow,
} from './compare-table.ts';
import { standardDrinkWords } from './figure-words.ts';
import { makingWords } from './sheet-words.ts';

export interface CompareInput {
  versions: readonly Version[];
  /** Which of them the others are compared with. */
  reference: number;
  units: ShownUnits;
  place: StandardDrinkPlace;
}

/** Everything two to four versions are compared by: the same rows in the same order for each. */
export function compareSections(input: CompareInput): CompareSection[] {
  return [
    { title: 'Lines', rows: lineRows(input) },
    { title: 'Making', rows: makingRows(input) },
    { title: 'Figures', rows: figureRows(input) },
    { title: 'Allergens', rows: allergenRows(input) },
  ];
}

/** Tasting notes by version. They are shown with how many there are, and never judged against one another. */
export function notesSection(notesByVersion: readonly (readonly Note[])[]): CompareSection {
  const summaries = notesByVersion.map(summariseNotes);
  const scaleRows = (summaries[0] ?? []).map(({ scale }, place) =>
    compareRow({
      key: scale,
      label: scale,
      cells: summaries.map((summary) => {
        const { mean, count } = summary[place] ?? { mean: null, count: 0 };
        const text = mean === null ? null : `${formatTrimmed({ value: mean, decimals: 1 })} (of ${count})`;
        return plainCell(text);
      }),
    }),
  );
  const words = compareRow({
    key: 'words',
    label: 'In words',
    cells: notesByVersion.map((notes) => plainCell(quotes(notes))),
  });
  return { title: 'Tasting notes', rows: [...scaleRows, words] };
}

function quotes(notes: readonly Note[]): string | null {
  const quoted = notes
    .filter((note) => note.words !== '')
    .map((note) => `“${note.words}” ${note.author?.name ?? 'somebody who has left'}`);
  return quoted.length === 0 ? null : quoted.join('\n');
}

function lineRows(input: CompareInput): CompareRow[] {
  return alignLines(input.versions).map((line) =>
    compareRow({
      key: line.key,
      label: line.name,
      cells: input.versions.map((_, column) => lineCell({ ...input, line, column })),
    }),
  );
}

function lineCell(input: CompareInput & { line: AlignedLine; column: number }): CompareCell {
  const { line, column, reference, units } = input;
  const cell = line.cells[column] ?? null;
  const referenceCell = line.cells[reference] ?? null;
  const shown = {
    text: cell === null ? null : lineText(cell, line, units.volumeUnit),
    detail: lineDetail(cell),
  };
  if (column === reference) return { ...shown, standing: 'reference', difference: null };
  if (cell === null) {
    return { ...shown, standing: referenceCell === null ? 'same' : 'left out', difference: null };
  }
  if (referenceCell === null) return { ...shown, standing: 'added', difference: null };
  return { ...shown, ...lineStanding({ ...input, cell, referenceCell }) };
}

function lineText(cell: AlignedCell, line: AlignedLine, volumeUnit: VolumeUnit): string {
  const amount = showAmountIn(cell.line.amount, volumeUnit);
  const name = cell.ingredient?.name ?? line.name;
  return name === line.name ? amount : `${amount} ${name}`;
}

function lineDetail(cell: AlignedCell | null): string | null {
  if (cell === null) return null;
  const parts = [cell.line.stage === 'top' ? 'added after mixing' : '', cell.line.note];
  return parts.filter((part) => part !== '').join(', ') || null;
}

function lineStanding(
  input: CompareInput & { column: number; cell: AlignedCell; referenceCell: AlignedCell },
): Pick<CompareCell, 'standing' | 'difference'> {
  const { versions, reference, column, cell, referenceCell, units } = input;
  const after = versions[column];
  const before = versions[reference];
  if (after === undefined || before === undefined) return { standing: 'same', difference: null };
  const difference = amountDifference({
    before: { ...amountContext(before), amount: referenceCell.line.amount },
    after: { ...amountContext(after), amount: cell.line.amount },
  });
  if (difference.direction === 'unknown') return { standing: 'differs', difference: null };
  if (difference.direction !== 'same') {
    const by = measureWords(difference.by, units.volumeUnit);
    return { standing: difference.direction, difference: `${by} ${difference.direction}` };
  }
  const isSame =
    cell.line.ingredientId === referenceCell.line.ingredientId &&
    lineDetail(cell) === lineDetail(referenceCell);
  return { standing: isSame ? 'same' : 'differs', difference: null };
}

function amountContext({ houseMeasures, body }: Version) {
  return { houseMeasures, partMl: body.partMl };
}

function measureWords(measure: AmountMeasure, unit: VolumeUnit): string {
  if (measure.kind === 'volume') return formatVolume({ volumeMl: measure.volumeMl, unit });
  if (measure.kind === 'mass') return formatMass(measure.massG);
  return `${formatTrimmed({ value: measure.pieces, decimals: 2 })} pieces`;
}

function makingRows({ versions, reference }: CompareInput): CompareRow[] {
  const build = textRow({
    label: 'Build',
    texts: versions.map(({ body }) => body.build.map((step, index) => `${index + 1}. ${step}`).join('\n')),
    reference,
  });
  return [...wordsRows(versions.map(makingWords), reference), build];
}

function allergenRows({ versions, reference }: CompareInput): CompareRow[] {
  const words = versions.map(({ figures }) => allergenWords(figures.allergens));
  return [
    textRow({ label: 'Contains', texts: words.map(({ contains }) => contains), reference }),
    textRow({ label: 'May contain', texts: words.map(({ mayContain }) => mayContain ?? ''), reference }),
    textRow({ label: 'Not reviewed', texts: words.map(({ notReviewed }) => notReviewed ?? ''), reference }),
    textRow({ label: 'US major allergens', texts: words.map(({ usMajor }) => usMajor), reference }),
  ];
}

/** Rows from the same list of labelled words of each version. */
function wordsRows(
  rowsByVersion: readonly { label: string; words: string }[][],
  reference: number,
): CompareRow[] {
  return (rowsByVersion[0] ?? []).map(({ label }, place) =>
    textRow({ label, texts: rowsByVersion.map((rows) => rows[place]?.words ?? ''), reference }),
  );
}

function textRow(input: { label: string; texts: readonly string[]; reference: number }): CompareRow {
  const { label, texts, reference } = input;
  return compareRow({
    key: label,
    label,
    cells: texts.map((text, column) => ({
      text: text || null,
      detail: null,
      standing: column === reference ? 'reference' : text === texts[reference] ? 'same' : 'differs',
      difference: null,
    })),
  });
}

function figureRows(input: CompareInput): CompareRow[] {
  const { versions, reference, units, place } = input;
  // The function compares with the first, so the reference goes first and the columns are put back after it.
  const order = [reference, ...versions.keys()].filter((column, at) => at === 0 || column !== reference);
  const rows = figureDifferences(order.map((column) => versions[column]?.figures ?? null));
  const shown = rows.map(({ figure, label, cells }) => {
    const inColumns = versions.map((_, column) => cells[order.indexOf(column)]);
    return compareRow({
      key: figure,
      label,
      cells: inColumns.map((cell, column) => ({
        text:
          cell === undefined || cell.value === null
            ? null
            : formatFigure({ figure, value: cell.value, ...units }),
        detail: null,
        standing: column === reference ? 'reference' : standingOf(cell),
        difference:
          column === reference || cell === undefined || cell.direction === 'unknown'
            ? null
            : formatFigureDifference({ figure, cell, ...units }),
      })),
    });
  });
  return [...shown, standardDrinkRow({ versions, place })];
}

function standingOf(cell: FigureDifference | undefined): Standing {
  if (cell === undefined) return 'same';
  const standings = { up: 'more', down: 'less', same: 'same', unknown: 'differs' } as const;
  return cell.value === null && cell.direction === 'unknown' ? 'same' : standings[cell.direction];
}

/** An estimate by country: how it stands is told by the ethanol of the drink, two rows of the same would be noise. */
function standardDrinkRow({ versions, place }: Pick<CompareInput, 'versions' | 'place'>): CompareRow {
  const rows = versions.map(({ figures }) => standardDrinkWords(figures, place));
  return compareRow({
    key: 'standard-drinks',
    label: rows[0]?.label ?? '',
    cells: rows.map(({ words }) => plainCell(words)),
  });
}

function plainCell(text: string | null): CompareCell {
  return { text, detail: null, standing: 'none', difference: null };
}
