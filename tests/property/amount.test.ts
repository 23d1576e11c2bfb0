import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { formatNumber } from '#shared/text/format-number.ts';
import { parseNumber } from '#shared/text/parse-number.ts';
import { roundedAmount, showAmountIn } from '#shared/text/show-amount.ts';
import {
  AMOUNT_UNITS,
  AMOUNT_VALUE_RANGE,
  type Amount,
  SMALLEST_READABLE_VALUE,
  amountTextWithUnit,
  formatAmount,
  measureOfAmount,
  parseAmount,
} from '#shared/units/amount.ts';
import { DEFAULT_HOUSE_MEASURES } from '#shared/units/house-measures.ts';

/** What a draft's amount may hold, by its contract. */
const MAX_AMOUNT_CHARACTERS = 40;

function value(): fc.Arbitrary<number> {
  const any = fc.double({ min: SMALLEST_READABLE_VALUE, max: AMOUNT_VALUE_RANGE.max, noNaN: true });
  const typed = fc.integer({ min: 1, max: 10_000_000 }).map((thousandths) => thousandths / 1000);
  const fraction = fc
    .record({
      whole: fc.integer({ min: 0, max: 100 }),
      numerator: fc.integer({ min: 1, max: 63 }),
      denominator: fc.integer({ min: 64, max: 99 }),
    })
    .map(({ whole, numerator, denominator }) => (whole * denominator + numerator) / denominator);
  const third = fc.integer({ min: 1, max: 200 }).map((count) => count / 3);
  return fc.oneof(any, typed, fraction, third);
}

function amount(): fc.Arbitrary<Amount> {
  return fc
    .record({ value: value(), unit: fc.constantFrom(...AMOUNT_UNITS) })
    .map(Object.freeze) as fc.Arbitrary<Amount>;
}

const ML_OF = { houseMeasures: DEFAULT_HOUSE_MEASURES, partMl: 30 };

describe('an amount', () => {
  it('that was written out is read as exactly the same', () => {
    fc.assert(
      fc.property(amount(), fc.constantFrom(...AMOUNT_UNITS), (written, defaultUnit) => {
        expect(parseAmount(formatAmount(written), { defaultUnit })).toEqual({ ok: true, amount: written });
      }),
    );
  });

  it('that was written out fits into the field of a draft', () => {
    fc.assert(
      fc.property(amount(), (written) => {
        expect(formatAmount(written).length).toBeLessThanOrEqual(MAX_AMOUNT_CHARACTERS);
      }),
    );
  });

  it('means the same once its unit is written behind it', () => {
    const text = fc.oneof(
      fc.string(),
      value().map(String),
      fc.constantFrom('1½', '3/4', '22,5', '1 1/2', '-5'),
    );
    fc.assert(
      fc.property(text, fc.constantFrom(...AMOUNT_UNITS), (typed, defaultUnit) => {
        const before = parseAmount(typed, { defaultUnit });
        const after = parseAmount(amountTextWithUnit({ text: typed, defaultUnit }), { defaultUnit: 'piece' });
        if (before.ok && before.amount.unit === defaultUnit) expect(after).toEqual(before);
      }),
    );
  });

  it('is read from a decimal point and a decimal comma alike, unless the comma could mean thousands', () => {
    const cents = fc.integer({ min: 1, max: 999_999 }).map((count) => (count / 100).toFixed(2));
    fc.assert(
      fc.property(cents, (text) => {
        expect(parseAmount(text.replace('.', ','), { defaultUnit: 'ml' })).toEqual(
          parseAmount(text, { defaultUnit: 'ml' }),
        );
      }),
    );
  });

  it('is never guessed: any text is an amount within limits, or is refused with a sentence', () => {
    const pieces = fc.array(
      fc.constantFrom(
        '1',
        '2',
        '0',
        '0.0001',
        '/',
        '.',
        ',',
        ' ',
        '-',
        '½',
        'oz',
        'ml',
        'e',
        'dash',
        '\u00a0',
        '+',
        '１',
      ),
      { maxLength: 10 },
    );
    const text = fc.oneof(
      fc.string({ unit: 'grapheme' }),
      pieces.map((parts) => parts.join('')),
    );
    fc.assert(
      fc.property(text, (typed) => {
        const result = parseAmount(typed, { defaultUnit: 'ml' });
        if (!result.ok) {
          expect(result.detail).toMatch(/\.$/);
          return;
        }
        expect(result.amount.value).toBeGreaterThanOrEqual(SMALLEST_READABLE_VALUE);
        expect(result.amount.value).toBeLessThanOrEqual(AMOUNT_VALUE_RANGE.max);
      }),
      { numRuns: 2000 },
    );
  });

  it('shown in the other unit is as much, within 1.5 % or half the last digit', () => {
    const poured = fc.record({
      value: value(),
      unit: fc.constantFrom('ml', 'cl', 'oz'),
    }) as fc.Arbitrary<Amount>;
    fc.assert(
      fc.property(poured, fc.constantFrom('ml', 'oz'), fc.boolean(), (written, unit, fractions) => {
        const shown = showAmountIn(written, unit, { fractions });
        const isExact = !shown.startsWith('≈');
        const read = parseAmount(shown.replace('≈ ', ''), { defaultUnit: 'piece' });
        // A shown amount may be larger than may be typed: 10 000 oz are 295 735 ml.
        fc.pre(read.ok);
        const [given, again] = [written, read.amount].map((each) => {
          const measure = measureOfAmount({ amount: each, ...ML_OF });
          return measure.kind === 'volume' ? measure.volumeMl : Number.NaN;
        }) as [number, number];
        expect(read.amount.unit).toBe(unit);
        expect(Math.abs(again - given)).toBeLessThanOrEqual(
          isExact ? 1e-8 * given : Math.max(0.015 * given, 0.15),
        );
      }),
    );
  });

  it('is rounded by less than a twentieth of a per cent', () => {
    fc.assert(
      fc.property(amount(), (computed) => {
        const rounded = roundedAmount(computed);
        expect(Math.abs(rounded.value - computed.value)).toBeLessThanOrEqual(0.0005 * computed.value);
      }),
    );
  });
});

describe('a number', () => {
  it('that is shown can be typed in again', () => {
    const number = fc.double({ min: -1e6, max: 1e6, noNaN: true });
    fc.assert(
      fc.property(number, fc.integer({ min: 0, max: 6 }), (shown, decimals) => {
        const read = parseNumber(formatNumber({ value: shown, decimals }));
        expect(read.ok && Math.abs(read.value - shown)).toBeLessThanOrEqual(
          0.5 * 10 ** -decimals * (1 + 1e-6),
        );
      }),
    );
  });
});
