/**
 * Numbers as people read them. This folder is the only place that rounds: figures stay whole everywhere else.
 *
 * The decimal sign is a point; a negative number has a real minus sign, so that columns of tabular figures line up.
 */

/** Between a number and its unit: a space that does not break. */
export const UNIT_SPACE = '\u00a0';
export const MINUS = '\u2212';
/** Shown where there is no number at all. */
export const NO_NUMBER = '\u2013';

/**
 * A number with a fixed count of decimals, such as `8.40`; `-0.0` is shown as `0.0`.
 *
 * @param input.value      any finite number
 * @param input.decimals   0 to 20
 */
export function formatNumber(input: { readonly value: number; readonly decimals: number }): string {
  const text = Math.abs(input.value).toFixed(input.decimals);
  const isZero = !/[1-9]/.test(text);
  return input.value < 0 && !isZero ? `${MINUS}${text}` : text;
}

/** As `formatNumber`, without zeros at the end: `22.5`, `30`. */
export function formatTrimmed(input: { readonly value: number; readonly decimals: number }): string {
  const text = formatNumber(input);
  return text.includes('.') ? text.replace(/\.?0+$/, '') : text;
}

/** A difference: always signed, `+0.3`, `−1.0`; one that rounds to nothing is `0.0` without a sign. */
export function formatSigned(input: { readonly value: number; readonly decimals: number }): string {
  const text = formatNumber(input);
  return input.value > 0 && /[1-9]/.test(text) ? `+${text}` : text;
}
