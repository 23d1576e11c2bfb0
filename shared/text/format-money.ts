import { UNIT_SPACE } from './format-number.ts';

/**
 * Money with its ISO 4217 code, which unlike a sign is the same in every country: `12.50 GBP`, `1200 JPY`.
 *
 * @param input.amount     decimal text, up to four decimals; it never passes through a number
 * @param input.currency   ISO 4217 code
 * @returns                the amount with at least the decimals of its currency, and none of its digits lost
 */
export function formatMoney(input: { readonly amount: string; readonly currency: string }): string {
  const [whole = '0', decimals = ''] = input.amount.split('.');
  const digits = decimals.replace(/0+$/, '').padEnd(minorDigits(input.currency), '0');
  return `${whole}${digits === '' ? '' : `.${digits}`}${UNIT_SPACE}${input.currency}`;
}

function minorDigits(currency: string): number {
  return (
    new Intl.NumberFormat('en', { style: 'currency', currency }).resolvedOptions().minimumFractionDigits ?? 2
  );
}
