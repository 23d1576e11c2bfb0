import type { DraftLine, SpecLine } from '../contracts/spec.ts';
import { type AmountUnit, type ParsedAmount, parseAmount } from '../units/amount.ts';

/** What a number alone means in a draft, whoever reads it. Fields write the unit behind it (`amountTextWithUnit`). */
export const DRAFT_DEFAULT_UNIT: AmountUnit = 'ml';

/** The amount of a line, read from its text where the line is still a draft. */
export function amountOfLine(line: DraftLine | SpecLine): ParsedAmount {
  if ('amount' in line) return { ok: true, amount: line.amount };
  return parseAmount(line.amountText, { defaultUnit: DRAFT_DEFAULT_UNIT });
}

/** Whether nothing at all was entered on a line. */
export function isBlankLine(line: DraftLine | SpecLine): boolean {
  return (
    !('amount' in line) &&
    line.ingredientId === null &&
    line.amountText.trim() === '' &&
    line.note.trim() === ''
  );
}
