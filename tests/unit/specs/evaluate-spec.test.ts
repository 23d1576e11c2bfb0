import { describe, expect, it } from 'vitest';

import type { DraftBody, SpecBody } from '#shared/contracts/spec.ts';
import type { GlassSnapshot } from '#shared/contracts/glass.ts';
import type { IngredientSnapshot } from '#shared/contracts/version.ts';
import { draftFromBody } from '#shared/specs/complete-draft.ts';
import { evaluateSpec } from '#shared/specs/evaluate-spec.ts';
import {
  LIME_ID,
  RUM_ID,
  SYRUP_ID,
  aComposition,
  aDraft,
  aDraftLine,
  aGlassSnapshot,
  aLimeJuice,
  aLine,
  aRum,
  aSpecBody,
  aSyrup,
  anId,
  anIngredientSnapshot,
  byId,
  frozen,
  theSourIngredients,
} from '#tests/support/builders.ts';

function evaluate(input: {
  body?: DraftBody | SpecBody;
  ingredients?: IngredientSnapshot[];
  glass?: GlassSnapshot | null;
}) {
  const { body = aSpecBody(), ingredients = theSourIngredients(), glass = aGlassSnapshot() } = input;
  return evaluateSpec({
    body: frozen(body),
    ingredients: byId(frozen(ingredients)),
    glass: frozen(glass),
    houseMeasures: frozen({ dashMl: 1, barSpoonMl: 5, dropMl: 0.05 }),
  });
}

/** The figures, where the test is about a spec that has some. */
function figuresOf(input: Parameters<typeof evaluate>[0]) {
  const { figures } = evaluate(input);
  if (figures === null) throw new Error('no figures');
  return figures;
}

const WATER_ID = anId(110);
/** Water of 20 °C, 998.20 kg/m³ (OIML R 22): what follows is arithmetic. */
const water = anIngredientSnapshot({
  id: WATER_ID,
  name: 'water',
  composition: { abvFraction: 0 },
});

function waterBody(volumeMl: number, over: Partial<SpecBody> = {}): SpecBody {
  return aSpecBody({
    lines: [aLine({ ingredientId: WATER_ID, amount: { value: volumeMl, unit: 'ml' } })],
    dilution: { kind: 'none' },
    ...over,
  });
}

describe('the figures of a shaken sour', () => {
  it('hold what its lines hold', () => {
    const figures = figuresOf({});
    // Ethanol 789.24 kg/m³ at 20 °C (OIML R 22). Malic as citric by equivalent masses, (192.12 / 3) / (134.09 / 2).
    expect(figures.ethanolG).toBeCloseTo(60 * 0.4 * 0.78924, 3);
    expect(figures.sugarG).toBeCloseTo((22.5 * 16 + 22.5 * 615) / 1000, 9);
    expect(figures.acidCitricG).toBeCloseTo((22.5 * (45 + (15 * 64.04) / 67.045)) / 1000, 4);
    expect(figures.sumOfPartsMl).toBe(105);
  });

  it('agree with the published worked drink, contraction counted', () => {
    // D. Arnold, Liquid Intelligence (2014), daiquiri: 159 ml, 15.0 %. By its equation D = 0.5193 at 22.86 %; with the
    // contraction of OIML R 22 that makes 159.5 ml and 15.05 %.
    const figures = figuresOf({});
    expect(figures.dilutionFraction).toBeCloseTo(0.5193, 2);
    expect(Math.abs(figures.finalMl - 159.5)).toBeLessThan(0.5);
    expect(Math.abs(figures.abvFraction - 0.1505)).toBeLessThan(0.0005);
  });

  it('are the same for the draft and for the version made of it', () => {
    const body = aSpecBody();
    expect(evaluate({ body: draftFromBody(body) })).toEqual(evaluate({ body }));
  });

  it('add up line by line', () => {
    const { figures, lines } = evaluate({});
    const sum = (member: 'massG' | 'ethanolG' | 'sugarG' | 'acidCitricG' | 'volumeMl') =>
      lines.reduce((total, line) => total + (line.ok ? line[member] : Number.NaN), 0);
    expect(lines.map((line) => line.lineId)).toEqual([anId(1), anId(2), anId(3)]);
    expect(sum('massG')).toBeCloseTo(figures?.undilutedMassG ?? 0, 9);
    expect(sum('ethanolG')).toBeCloseTo(figures?.ethanolG ?? 0, 9);
    expect(sum('sugarG')).toBeCloseTo(figures?.sugarG ?? 0, 9);
    expect(sum('acidCitricG')).toBeCloseTo(figures?.acidCitricG ?? 0, 9);
    expect(sum('volumeMl')).toBeCloseTo(105, 9);
  });

  it('follow a composition that is edited in place', () => {
    const rum = { ...aRum(), composition: { ...aComposition({ abvFraction: 0.4 }) } };
    const body = aSpecBody({ lines: [aLine()] });
    const input = {
      body,
      ingredients: byId([rum]),
      glass: null,
      houseMeasures: { dashMl: 1, barSpoonMl: 5, dropMl: 0.05 },
    };
    const before = evaluateSpec(input).figures?.ethanolG ?? 0;
    rum.composition = Object.assign(rum.composition, { abvFraction: 0.2 });
    expect(evaluateSpec(input).figures?.ethanolG).toBeCloseTo(before / 2, 9);
    rum.composition = Object.assign(rum.composition, { acidsGPerL: { citric: 10 } });
    expect(evaluateSpec(input).figures?.acidCitricG).toBeCloseTo(0.6, 9);
  });
});

describe('a trace of acid that nobody could find', () => {
  it.each([
    [1e-320, null],
    [0.0009, null],
    [0.0011, 600 / 0.0011],
  ])('%d g/L of citric acid beside sugar has the ratio %d', (citric, ratio) => {
    const composition = aComposition({ sugarGPerL: 600, acidsGPerL: { citric } });
    const body = aSpecBody({ lines: [aLine({ ingredientId: SYRUP_ID })], dilution: { kind: 'none' } });
    const { sugarAcidRatio } = figuresOf({ body, ingredients: [aSyrup({ composition })] });
    if (ratio === null) expect(sugarAcidRatio).toBeNull();
    else expect((sugarAcidRatio ?? 0) / ratio).toBeCloseTo(1, 9);
  });
});

describe('ethanol that is pure but for the last bit', () => {
  it('is never stronger than pure: rounding is not nonsense', () => {
    const ethanol = anIngredientSnapshot({ composition: { abvFraction: 0.9999999999999994 } });
    const poured = [5.781728021633747, 39.60382465105607, 192.26730099691048];
    const lines = poured.map((value) => aLine({ amount: { value, unit: 'ml' } }));
    const figures = figuresOf({ body: aSpecBody({ lines }), ingredients: [ethanol] });
    expect(figures.undilutedAbvFraction).toBeLessThanOrEqual(1);
    expect(figures.undilutedAbvFraction).toBeCloseTo(1, 9);
  });
});

describe('a line written in', () => {
  it.each([
    ['grams is that mass', '30 g', 30 / 1.23],
    ['pieces weighs what its pieces weigh', '2 pieces', 41 / 1.23],
    ['dashes holds the team’s dashes', '3 dashes', 3],
    ['parts holds the spec’s parts', '1.5 parts', 45],
    ['centilitres holds ten millilitres each', '2 cl', 20],
  ])('%s', (_title, amountText, volumeMl) => {
    const syrup = aSyrup({
      pieceMassG: 20.5,
      composition: aComposition({ sugarGPerL: 615, densityGPerMl: 1.23 }),
    });
    const body = aDraft({ lines: [aDraftLine({ ingredientId: SYRUP_ID, amountText })] });
    const [line] = evaluate({ body, ingredients: [syrup] }).lines;
    expect(line).toMatchObject({ ok: true });
    expect(line?.ok ? line.volumeMl : 0).toBeCloseTo(volumeMl, 9);
    expect(line?.ok ? line.massG : 0).toBeCloseTo(volumeMl * 1.23, 9);
  });
});

describe('a line that cannot be computed', () => {
  it.each([
    ['empty', { ingredientId: null, amountText: '' }],
    ['no-ingredient', { ingredientId: null, amountText: '30 ml' }],
    ['no-amount', { ingredientId: LIME_ID, amountText: '' }],
    ['unreadable-amount', { ingredientId: LIME_ID, amountText: '-5' }],
    ['unknown-ingredient', { ingredientId: anId(999), amountText: '30 ml' }],
    ['piece-mass-missing', { ingredientId: LIME_ID, amountText: '1 piece' }],
    ['too-large', { ingredientId: LIME_ID, amountText: '10000 oz' }],
    ['composition-does-not-fit', { ingredientId: anId(120), amountText: '30 ml' }],
  ])('is reported as %s and left out; the others count', (reason, line) => {
    const impossible = anIngredientSnapshot({
      id: anId(120),
      name: 'nonsense',
      composition: { abvFraction: 0.9, sugarGPerL: 900 },
    });
    const body = aDraft({ lines: [aDraftLine(), aDraftLine({ id: anId(2), ...line })] });
    const { figures, lines } = evaluate({ body, ingredients: [...theSourIngredients(), impossible] });
    expect(lines[0]?.ok).toBe(true);
    expect(lines[1]).toMatchObject({ lineId: anId(2), ok: false, reason });
    expect(lines[1]?.ok ? '' : lines[1]?.detail).toMatch(/\.$/);
    expect(figures?.sumOfPartsMl).toBe(60);
  });

  it('leaves no figures when there is no other line', () => {
    const lines = [aDraftLine({ amountText: '' })];
    expect(evaluate({ body: aDraft({ lines }) }).figures).toBeNull();
    expect(evaluate({ body: aDraft({ lines: [] }) })).toEqual({ figures: null, lines: [] });
  });

  it('never stops the calculation, however much the thirty lines hold', () => {
    const lines = Array.from({ length: 30 }, (_, index) =>
      aDraftLine({ id: anId(index), amountText: '10000 ml' }),
    );
    expect(figuresOf({ body: aDraft({ lines }) }).sumOfPartsMl).toBe(300_000);
    const parts = aDraft({
      partMl: 1000,
      lines: lines.map((line) => ({ ...line, amountText: '10000 parts' })),
    });
    expect(evaluate({ body: parts }).figures).toBeNull();
  });
});

describe('lines added on top', () => {
  it('are not diluted and not part of the mix', () => {
    const alone = figuresOf({});
    const soda = aLine({
      id: anId(4),
      ingredientId: WATER_ID,
      amount: { value: 60, unit: 'ml' },
      stage: 'top',
    });
    const body = aSpecBody({ lines: [...aSpecBody().lines, soda] });
    const topped = figuresOf({ body, ingredients: [...theSourIngredients(), water] });
    expect(topped.topMl).toBe(60);
    expect(topped.undilutedMl).toBe(alone.undilutedMl);
    expect(topped.meltWaterMl).toBe(alone.meltWaterMl);
    expect(topped.ethanolG).toBeCloseTo(alone.ethanolG, 9);
    expect(topped.finalMl).toBeGreaterThan(alone.finalMl + 59);
  });
});

describe('the dilution', () => {
  it('set by hand is the melt water for the mix', () => {
    const figures = figuresOf({
      body: waterBody(80, { dilution: { kind: 'by hand', dilutionFraction: 0.25 } }),
      ingredients: [water],
    });
    expect(figures).toMatchObject({ dilutionKind: 'by hand', dilutionFraction: 0.25 });
    expect(figures.meltWaterMl).toBeCloseTo(20, 9);
    expect(figures.finalMl).toBeCloseTo(100, 6);
  });

  it('is none, with a warning, where no curve was published for the method', () => {
    const figures = figuresOf({ body: aSpecBody({ method: 'throw' }) });
    expect(figures.dilutionKind).toBe('none');
    expect(figures.warnings.map((warning) => warning.code)).toEqual(['no-published-curve']);
  });
});

describe('the wash line', () => {
  it('is the height that the drink reaches in the glass', () => {
    const { washLine } = figuresOf({ body: waterBody(100), ingredients: [water] });
    // A cylinder: 100 000 mm³ ÷ (π × 30² mm²) = 35.37 mm; brim π × 30² × 100 mm³ = 282.74 mL.
    expect(washLine?.heightMm).toBeCloseTo(35.37, 2);
    expect(washLine?.brimMl).toBeCloseTo(282.74, 2);
    expect(washLine?.headroomMl).toBeCloseTo(182.74, 2);
  });

  it('is lifted by ice that floats: its own mass of drink is pushed aside', () => {
    const glassIce = { kind: 'block', massG: 50 } as const;
    const { washLine } = figuresOf({ body: waterBody(100, { glassIce }), ingredients: [water] });
    // Archimedes: 50 g ÷ 0.9982 g/mL = 50.09 mL.
    expect(washLine?.fillMl).toBeCloseTo(150.09, 2);
    expect(washLine?.heightMm).toBeCloseTo(53.08, 2);
  });

  it('takes no ice when none is said to be in the glass', () => {
    const glassIce = { kind: 'none', massG: 50 } as const;
    const { washLine } = figuresOf({ body: waterBody(100, { glassIce }), ingredients: [water] });
    expect(washLine?.fillMl).toBeCloseTo(100, 6);
  });

  it('warns of a drink that does not fit, and says by how much', () => {
    const { washLine, warnings } = figuresOf({ body: waterBody(300), ingredients: [water] });
    expect(warnings.map((warning) => warning.code)).toEqual(['overflows']);
    expect(washLine?.headroomMl).toBeCloseTo(282.74 - 300, 2);
    expect(washLine?.heightMm).toBeCloseTo(100, 9);
  });

  it('is none without a glass', () => {
    expect(figuresOf({ glass: null }).washLine).toBeNull();
  });
});

describe('allergens of the drink', () => {
  const unreviewed = { reviewed: false, contains: [], mayContain: [] };

  it('come from all lines, in the order of the regulation, and nothing is contained and perhaps contained at once', () => {
    const rum = aRum({
      allergens: { reviewed: true, contains: ['sulphites'], mayContain: ['nuts', 'gluten'] },
    });
    const syrup = aSyrup({ allergens: { reviewed: true, contains: ['gluten'], mayContain: [] } });
    expect(figuresOf({ ingredients: [rum, aLimeJuice(), syrup] }).allergens).toEqual({
      contains: ['gluten', 'sulphites'],
      mayContain: ['nuts'],
      notReviewed: [],
    });
  });

  it('name what nobody has reviewed, and count what it is known to contain', () => {
    const lime = aLimeJuice({ allergens: { ...unreviewed, contains: ['milk'] } });
    expect(figuresOf({ ingredients: [aRum(), lime, aSyrup({ allergens: unreviewed })] }).allergens).toEqual({
      contains: ['milk'],
      mayContain: [],
      notReviewed: ['lime juice', 'sugar syrup'],
    });
  });

  it('count a line whose amount cannot be read, and one whose ingredient cannot be found', () => {
    const lime = aLimeJuice({ allergens: { reviewed: true, contains: ['celery'], mayContain: [] } });
    const body = aDraft({
      lines: [
        aDraftLine({ id: anId(1), ingredientId: RUM_ID }),
        aDraftLine({ id: anId(2), ingredientId: LIME_ID, amountText: 'a little' }),
        aDraftLine({ id: anId(3), ingredientId: anId(999) }),
      ],
    });
    expect(figuresOf({ body, ingredients: [aRum(), lime] }).allergens).toEqual({
      contains: ['celery'],
      mayContain: [],
      notReviewed: ['an ingredient that cannot be found'],
    });
  });
});
