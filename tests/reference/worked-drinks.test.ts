import { describe, expect, it } from 'vitest';

import { totalAcid } from '#shared/physics/acids.ts';
import { contentsPerMl } from '#shared/physics/contents.ts';
import {
  PUBLISHED_DRINKS,
  type PublishedDrink,
  STRUCTURE_RANGES,
} from '#shared/physics/data/published-drinks.ts';
import { publishedDilution } from '#shared/physics/dilution.ts';
import { finishedDrink } from '#shared/physics/finished-drink.ts';
import { readReferenceTable } from '#tests/support/reference-table.ts';

const table = readReferenceTable('worked-drinks');

function portionsOf(drink: PublishedDrink) {
  return drink.lines.map((line) => ({
    contentsPerMl: contentsPerMl(line.composition),
    volumeMl: line.volumeMl,
  }));
}

function made(key: string) {
  const drink = PUBLISHED_DRINKS.find((each) => each.key === key)!;
  const mixPortions = portionsOf(drink);
  return finishedDrink({
    mixPortions,
    topPortions: [],
    dilution: { kind: 'published' },
    method: drink.method,
  });
}

/** The water that the book's arithmetic adds: the curve at the strength, and times the volume, of volumes merely added. */
function madeWithTheBooksWater(key: string) {
  const drink = PUBLISHED_DRINKS.find((each) => each.key === key)!;
  const sumMl = drink.lines.reduce((sum, line) => sum + line.volumeMl, 0);
  const ethanolMl = drink.lines.reduce((sum, line) => sum + line.volumeMl * line.composition.abvFraction, 0);
  const dilution = publishedDilution({ method: drink.method, abvFraction: ethanolMl / sumMl });
  if (!dilution.ok) throw new Error(dilution.reason);
  const mixPortions = portionsOf(drink);
  const { undilutedMl } = made(key);
  return finishedDrink({
    mixPortions,
    topPortions: [],
    dilution: { kind: 'by hand', dilutionFraction: (dilution.fraction * sumMl) / undilutedMl },
    method: drink.method,
  });
}

/** Half a unit in the last digit the book prints, when that is more than the recollection is good for. */
function bookTolerance(input: { value: number; halfDigit: number }): number {
  return Math.max(table.tolerance * input.value, input.halfDigit);
}

describe('worked drinks of a book, its rounded figures against ours', () => {
  it('are all there', () => {
    expect(PUBLISHED_DRINKS.map((drink) => drink.key)).toEqual(table.rows.map((row) => row.text('key')));
  });

  it.each(table.rows)('$label', (row) => {
    const drink = made(row.text('key'));
    const columns = [
      ['book_ml', drink.finalMl, 0.5],
      ['book_abv_percent', 100 * drink.abvFraction, 0.5],
      ['book_sugar_g_per_100ml', drink.sugarGPerL / 10, 0.05],
      ['book_acid_g_per_100ml', totalAcid(drink.acidsGPerL) / 10, 0.006],
    ] as const;
    for (const [column, ours, halfDigit] of columns) {
      const book = row.numberOrNull(column);
      if (book === null) continue;
      expect(Math.abs(ours - book), column).toBeLessThanOrEqual(bookTolerance({ value: book, halfDigit }));
    }
  });

  it.each(table.rows)('with the book in the data the screens show: $label', (row) => {
    const { book } = PUBLISHED_DRINKS.find((each) => each.key === row.text('key'))!;
    const percent = (fraction: number | null, factor: number) =>
      fraction === null ? null : fraction * factor;
    expect(book.volumeMl).toBe(row.numberOrNull('book_ml'));
    expect(percent(book.abvFraction, 100) ?? null).toBe(row.numberOrNull('book_abv_percent'));
    const sugar = row.numberOrNull('book_sugar_g_per_100ml');
    expect(book.sugarGPerL).toBe(sugar === null ? null : Math.round(sugar * 10));
    const acid = row.numberOrNull('book_acid_g_per_100ml');
    expect(book.acidGPerL).toBe(acid === null ? null : Math.round(acid * 100) / 10);
  });
});

describe('worked drinks, volumes merely added (evaluated elsewhere) against ours', () => {
  it.each(table.rows)('adding volumes overstates the volume by 0 to 0.5 %%: $label', (row) => {
    const drink = made(row.text('key'));
    const overstated = row.number('added_ml') / drink.finalMl - 1;
    expect(overstated).toBeGreaterThan(-0.0005);
    expect(overstated).toBeLessThan(0.006);
    expect(100 * drink.abvFraction).toBeGreaterThan(row.number('added_abv_percent') - 0.01);
  });

  // The other program counts acid as sugar and is rounded to 0.1 mL and 0.01 %: 0.1 mL and 0.02 % leave room for both.
  it.each(table.rows)('with contraction and the same water: $label', (row) => {
    const drink = madeWithTheBooksWater(row.text('key'));
    expect(Math.abs(drink.finalMl - row.number('contracted_ml'))).toBeLessThanOrEqual(0.1);
    expect(Math.abs(100 * drink.abvFraction - row.number('contracted_abv_percent'))).toBeLessThanOrEqual(
      0.02,
    );
  });

  it.each(table.rows)(
    'taking strength and volume of the real mix changes the water by under 0.5 mL: $label',
    (row) => {
      const ours = made(row.text('key'));
      const theirs = madeWithTheBooksWater(row.text('key'));
      expect(Math.abs(ours.meltWaterMl - theirs.meltWaterMl)).toBeLessThan(0.5);
    },
  );
});

describe('structure ranges of the same book (low confidence)', () => {
  it.each(STRUCTURE_RANGES)('$family: from low to high', (range) => {
    const ranges = [range.undilutedMl, range.dilutionFraction, range.finalMl, range.abvFraction];
    for (const { min, max } of [...ranges, range.sugarGPerL, range.acidGPerL]) {
      expect(min).toBeLessThanOrEqual(max);
    }
  });

  it('holds the shaken drinks above within a tenth of its width', () => {
    const shaken = STRUCTURE_RANGES.find((range) => range.family === 'shaken')!;
    const slack = (range: { min: number; max: number }) => (range.max - range.min) / 10;
    for (const key of ['daiquiri', 'margarita', 'hemingway-daiquiri']) {
      const drink = made(key);
      expect(drink.finalMl, key).toBeGreaterThan(shaken.finalMl.min - slack(shaken.finalMl));
      expect(drink.finalMl, key).toBeLessThan(shaken.finalMl.max + slack(shaken.finalMl));
      expect(drink.abvFraction, key).toBeGreaterThan(shaken.abvFraction.min - slack(shaken.abvFraction));
      expect(drink.abvFraction, key).toBeLessThan(shaken.abvFraction.max + slack(shaken.abvFraction));
    }
  });
});
