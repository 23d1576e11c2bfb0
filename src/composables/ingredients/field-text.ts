import { formatTrimmed } from '#shared/text/format-number.ts';
import { parseNumber } from '#shared/text/parse-number.ts';

/** Enough for every quantity of an ingredient, few enough to hide that 100 × 0.42 is not quite 42 in binary. */
const DECIMALS = 6;

/** A stored number as a field shows it. */
export function textFromNumber(value: number): string {
  return formatTrimmed({ value, decimals: DECIMALS });
}

/** The number in a field, or null while there is none. */
export function numberFromText(text: string): number | null {
  const parsed = parseNumber(text);
  return parsed.ok ? parsed.value : null;
}
