import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { LINE_STAGES, type SpecBody, type SpecLine } from '#shared/contracts/spec.ts';
import type { Figures, IngredientSnapshot } from '#shared/contracts/version.ts';
import { METHODS } from '#shared/physics/dilution.ts';
import { alignLines } from '#shared/specs/align-lines.ts';
import { completeDraft, draftFromBody } from '#shared/specs/complete-draft.ts';
import { describeChanges } from '#shared/specs/describe-changes.ts';
import { evaluateSpec } from '#shared/specs/evaluate-spec.ts';
import { figureDifferences } from '#shared/specs/figure-differences.ts';
import { factorForTotalVolume, scaleDraft } from '#shared/specs/scale-lines.ts';
import { amountOfLine } from '#shared/specs/line-amount.ts';
import { AMOUNT_UNITS } from '#shared/units/amount.ts';
import { DEFAULT_HOUSE_MEASURES } from '#shared/units/house-measures.ts';
import { composition, dilutionChoice } from '#tests/support/arbitraries.ts';
import {
  aSpecBody,
  aGlassSnapshot,
  anId,
  anIngredientSnapshot,
  byId,
  frozen,
} from '#tests/support/builders.ts';

interface Drink {
  readonly body: SpecBody;
  readonly ingredients: IngredientSnapshot[];
}

function ingredient(number: number): fc.Arbitrary<IngredientSnapshot> {
  return fc
    .record({ composition: composition(), pieceMassG: fc.double({ min: 1, max: 20, noNaN: true }) })
    .map((given) => anIngredientSnapshot({ id: anId(100 + number), name: `ingredient ${number}`, ...given }));
}

/** Amounts that stay within their limits, and a line under 33 litres, when they are made a dozen times. */
function line(number: number, ingredients: number): fc.Arbitrary<SpecLine> {
  return fc.record({
    id: fc.constant(anId(number)),
    ingredientId: fc.integer({ min: 0, max: ingredients - 1 }).map((index) => anId(100 + index)),
    amount: fc.record({
      value: fc.integer({ min: 10, max: 9000 }).map((hundredths) => hundredths / 100),
      unit: fc.constantFrom(...AMOUNT_UNITS),
    }),
    stage: fc.constantFrom(...LINE_STAGES),
    note: fc.constantFrom('', 'fresh'),
  });
}

function drink(): fc.Arbitrary<Drink> {
  return fc
    .record({ lines: fc.integer({ min: 1, max: 6 }), ingredients: fc.integer({ min: 1, max: 4 }) })
    .chain((count) =>
      fc.record({
        lines: fc.tuple(
          ...Array.from({ length: count.lines }, (_, index) => line(index + 1, count.ingredients)),
        ),
        ingredients: fc.tuple(...Array.from({ length: count.ingredients }, (_, index) => ingredient(index))),
        method: fc.constantFrom(...METHODS),
        dilution: dilutionChoice(),
      }),
    )
    .map(({ lines, ingredients, method, dilution }) =>
      frozen({ body: aSpecBody({ lines, method, dilution }), ingredients }),
    );
}

function figuresOf(made: Drink): Figures {
  const { figures } = evaluateSpec({
    body: made.body,
    ingredients: byId(made.ingredients),
    glass: null,
    houseMeasures: DEFAULT_HOUSE_MEASURES,
  });
  if (figures === null) throw new Error('no figures');
  return figures;
}

/** Equal to within what the order of additions may change. */
function expectClose(one: number | null, other: number | null, tolerance = 1e-9): void {
  if (one === null || other === null) {
    expect(one).toBe(other);
    return;
  }
  expect(Math.abs(one - other)).toBeLessThanOrEqual(tolerance * Math.max(1, Math.abs(one), Math.abs(other)));
}

const EXTENSIVE = [
  'sumOfPartsMl',
  'undilutedMl',
  'undilutedMassG',
  'meltWaterMl',
  'topMl',
  'finalMl',
  'finalMassG',
  'ethanolG',
  'waterG',
  'sugarG',
  'acidCitricG',
  'energyKcal',
] as const;
const INTENSIVE = [
  'undilutedAbvFraction',
  'dilutionFraction',
  'densityGPerMl',
  'abvFraction',
  'sugarGPerL',
  'acidCitricGPerL',
  'sugarAcidRatio',
  'freezingPointC',
] as const;

describe('the figures of a spec', () => {
  it('grow with its lines: masses and volumes by the factor, strength and concentrations not at all', () => {
    fc.assert(
      fc.property(drink(), fc.constantFrom(2, 0.5, 12), (made, factor) => {
        const lines = made.body.lines.map((each) => ({
          ...each,
          amount: { ...each.amount, value: each.amount.value * factor },
        }));
        const before = figuresOf(made);
        const after = figuresOf({ ...made, body: { ...made.body, lines } });
        for (const figure of EXTENSIVE) expectClose(after[figure], before[figure] * factor);
        for (const figure of INTENSIVE) expectClose(after[figure], before[figure]);
      }),
    );
  });

  it('do not depend on the order of its lines', () => {
    const shuffled = drink().chain((made) =>
      fc.record({
        made: fc.constant(made),
        lines: fc.shuffledSubarray(made.body.lines, { minLength: made.body.lines.length }),
      }),
    );
    fc.assert(
      fc.property(shuffled, ({ made, lines }) => {
        const before = figuresOf(made);
        const after = figuresOf({ ...made, body: { ...made.body, lines } });
        for (const figure of [...EXTENSIVE, ...INTENSIVE]) expectClose(after[figure], before[figure]);
        expect(after.allergens).toEqual(before.allergens);
        expect(figureDifferences([before, after]).every((row) => row.isSame)).toBe(true);
      }),
    );
  });

  it('are those of its draft', () => {
    fc.assert(
      fc.property(drink(), (made) => {
        const input = {
          ingredients: byId(made.ingredients),
          glass: aGlassSnapshot(),
          houseMeasures: DEFAULT_HOUSE_MEASURES,
        };
        expect(evaluateSpec({ ...input, body: draftFromBody(made.body) })).toEqual(
          evaluateSpec({ ...input, body: made.body }),
        );
      }),
    );
  });
});

describe('a draft', () => {
  it('made from a version becomes that version again', () => {
    fc.assert(
      fc.property(drink(), ({ body }) => {
        expect(completeDraft(frozen(draftFromBody(body)))).toEqual({ ok: true, body });
      }),
    );
  });

  it('scaled and scaled back has its amounts again, to a tenth of a per cent', () => {
    fc.assert(
      fc.property(drink(), fc.double({ min: 0.1, max: 100, noNaN: true }), ({ body }, factor) => {
        const draft = frozen(draftFromBody(body));
        const there = scaleDraft({ draft, factor });
        const back = there.ok ? scaleDraft({ draft: frozen(there.draft), factor: 1 / factor }) : there;
        if (!back.ok) throw new Error(JSON.stringify(back.errors));
        back.draft.lines.forEach((each, index) => {
          const read = amountOfLine(each);
          const { value, unit } = body.lines[index]!.amount;
          expect(read.ok && read.amount.unit).toBe(unit);
          expect(read.ok && Math.abs(read.amount.value / value - 1)).toBeLessThanOrEqual(0.00101);
        });
      }),
    );
  });

  it('scaled for a wanted volume makes that volume, to a tenth of a per cent', () => {
    fc.assert(
      fc.property(drink(), fc.double({ min: 0.5, max: 10, noNaN: true }), (made, share) => {
        const input = {
          ingredients: byId(made.ingredients),
          glass: null,
          houseMeasures: DEFAULT_HOUSE_MEASURES,
        };
        const draft = draftFromBody(made.body);
        const evaluation = evaluateSpec({ ...input, body: draft });
        const targetMl = (evaluation.figures?.finalMl ?? 0) * share;
        const factor = factorForTotalVolume({ evaluation, targetMl });
        const scaled = factor.ok ? scaleDraft({ draft, factor: factor.factor }) : factor;
        if (!scaled.ok) throw new Error(JSON.stringify(scaled));
        const madeMl = evaluateSpec({ ...input, body: scaled.draft }).figures?.finalMl ?? 0;
        expect(Math.abs(madeMl / targetMl - 1)).toBeLessThanOrEqual(0.001);
      }),
    );
  });
});

describe('two versions', () => {
  const versionOf = (made: Drink) => ({ ...made, glass: null, figures: figuresOf(made) });

  it('that are the same have nothing to tell', () => {
    fc.assert(
      fc.property(drink(), (made) => {
        expect(describeChanges({ before: versionOf(made), after: versionOf(made) })).toEqual([]);
      }),
    );
  });

  it('have sentences of one line, whatever became of them', () => {
    fc.assert(
      fc.property(drink(), drink(), (one, other) => {
        for (const sentence of describeChanges({ before: versionOf(one), after: versionOf(other) })) {
          expect(sentence).toMatch(/^\S[^\n]*\S$/);
          expect(sentence).not.toMatch(/undefined|null|NaN/);
        }
      }),
      { numRuns: 100 },
    );
  });

  it('and more, side by side, show every line exactly once in its own column', () => {
    fc.assert(
      fc.property(fc.array(drink(), { minLength: 1, maxLength: 4 }), (drinks) => {
        const rows = alignLines(drinks);
        drinks.forEach((made, column) => {
          const shown = rows.flatMap((row) => (row.cells[column] ? [row.cells[column]] : []));
          const inOrder = [...shown].sort((one, other) => one.position - other.position);
          expect(inOrder.map((cell) => cell.line)).toEqual(made.body.lines);
        });
        expect(new Set(rows.map((row) => row.cells.findIndex((cell) => cell !== null))).has(-1)).toBe(false);
      }),
    );
  });
});
