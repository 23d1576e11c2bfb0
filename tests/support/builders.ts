/**
 * Valid things to test with. A test states only what matters to it; the rest is the same in every run.
 */
import type { Glass, GlassSnapshot } from '#shared/contracts/glass.ts';
import type { Ingredient } from '#shared/contracts/ingredient.ts';
import type { DraftBody, DraftLine, SpecBody, SpecLine } from '#shared/contracts/spec.ts';
import type { Figures, IngredientSnapshot, Version } from '#shared/contracts/version.ts';
import type { Composition } from '#shared/physics/composition.ts';
import { DEFAULT_HOUSE_MEASURES } from '#shared/units/house-measures.ts';

/** A UUID that is the same in every run: the number is its end. */
export function anId(number: number): string {
  return `00000000-0000-4000-8000-${String(number).padStart(12, '0')}`;
}

/** The same thing, frozen through and through: a calculation that writes to its input throws. */
export function frozen<Thing>(thing: Thing): Thing {
  if (typeof thing === 'object' && thing !== null && !Object.isFrozen(thing)) {
    Object.freeze(thing);
    Object.values(thing).forEach(frozen);
  }
  return thing;
}

const NOW = '2026-12-01T12:00:00.000Z';

/** Ids of the three ingredients of the sour that most tests are about. */
export const RUM_ID = anId(101);
export const LIME_ID = anId(102);
export const SYRUP_ID = anId(103);
export const COUPE_ID = anId(201);

export function aComposition(over: Partial<Composition> = {}): Composition {
  return { abvFraction: 0, sugarGPerL: 0, acidsGPerL: {}, densityGPerMl: null, ...over };
}

/** White rum of 40 % vol, unless said otherwise; reviewed and free of allergens. */
export function anIngredientSnapshot(
  over: Partial<Omit<IngredientSnapshot, 'composition'>> & { composition?: Partial<Composition> } = {},
): IngredientSnapshot {
  return {
    id: RUM_ID,
    revision: 1,
    name: 'white rum',
    category: 'spirit',
    pieceMassG: null,
    allergens: { reviewed: true, contains: [], mayContain: [] },
    ...over,
    composition: { ...aComposition({ abvFraction: 0.4, ...over.composition }) },
  };
}

export function aRum(over: Partial<IngredientSnapshot> = {}): IngredientSnapshot {
  return anIngredientSnapshot(over);
}

/** 60 g/L of acid, three quarters of it citric. */
export function aLimeJuice(over: Partial<IngredientSnapshot> = {}): IngredientSnapshot {
  return {
    ...anIngredientSnapshot(),
    id: LIME_ID,
    name: 'lime juice',
    category: 'juice',
    composition: aComposition({ sugarGPerL: 16, acidsGPerL: { citric: 45, malic: 15 } }),
    ...over,
  };
}

/** Sugar and water by equal mass: 615 g/L. */
export function aSyrup(over: Partial<IngredientSnapshot> = {}): IngredientSnapshot {
  return {
    ...anIngredientSnapshot(),
    id: SYRUP_ID,
    name: 'sugar syrup',
    category: 'syrup',
    composition: aComposition({ sugarGPerL: 615 }),
    ...over,
  };
}

/** Rum, lime juice and sugar syrup. */
export function theSourIngredients(): IngredientSnapshot[] {
  return [aRum(), aLimeJuice(), aSyrup()];
}

export function byId(ingredients: readonly IngredientSnapshot[]): Map<string, IngredientSnapshot> {
  return new Map(ingredients.map((ingredient) => [ingredient.id, ingredient]));
}

/** An ingredient of the back bar as the API returns it. */
export function anIngredient(over: Partial<Ingredient> = {}): Ingredient {
  const how = { how: 'label', spread: 0.02 } as const;
  return {
    ...anIngredientSnapshot(),
    knowledge: { abv: how, sugar: how, acid: how },
    source: '',
    note: '',
    computedDensityGPerMl: 0.948,
    packs: [{ size: 700, sizeUnit: 'ml', price: '18.50', pricedOn: '2026-11-02' }],
    retiredAt: null,
    createdAt: NOW,
    updatedAt: NOW,
    ...over,
  };
}

/** A straight-walled glass of 60 mm inside width and 100 mm height: 282.7 mL to the brim, 2.827 mL a millimetre. */
export function aGlassSnapshot(over: Partial<GlassSnapshot> = {}): GlassSnapshot {
  return {
    id: COUPE_ID,
    name: 'tumbler',
    profile: [
      { heightMm: 0, radiusMm: 30 },
      { heightMm: 100, radiusMm: 30 },
    ],
    stemMm: 0,
    brimMl: 282.74,
    ...over,
  };
}

export function aGlass(over: Partial<Glass> = {}): Glass {
  return { ...aGlassSnapshot(), revision: 1, retiredAt: null, ...over };
}

export function aLine(over: Partial<SpecLine> = {}): SpecLine {
  return {
    id: anId(1),
    ingredientId: RUM_ID,
    amount: { value: 60, unit: 'ml' },
    stage: 'mix',
    note: '',
    ...over,
  };
}

export function aDraftLine(over: Partial<DraftLine> = {}): DraftLine {
  return { id: anId(1), ingredientId: RUM_ID, amountText: '60 ml', stage: 'mix', note: '', ...over };
}

const MAKING = {
  method: 'shake',
  dilution: { kind: 'published' },
  ice: 'cubes',
  glassId: COUPE_ID,
  glassIce: { kind: 'none', massG: 0 },
  garnish: 'lime wheel',
  build: ['Shake hard with ice.', 'Strain into the chilled glass.'],
  partMl: 30,
} as const;

/** A shaken sour: rum 60, lime juice 22.5, sugar syrup 22.5 ml. */
export function aSpecBody(over: Partial<SpecBody> = {}): SpecBody {
  return {
    ...MAKING,
    build: [...MAKING.build],
    lines: [
      aLine({ id: anId(1), ingredientId: RUM_ID, amount: { value: 60, unit: 'ml' } }),
      aLine({ id: anId(2), ingredientId: LIME_ID, amount: { value: 22.5, unit: 'ml' } }),
      aLine({ id: anId(3), ingredientId: SYRUP_ID, amount: { value: 22.5, unit: 'ml' } }),
    ],
    ...over,
  };
}

/** The same sour while it is being written. */
export function aDraft(over: Partial<DraftBody> = {}): DraftBody {
  return {
    ...MAKING,
    build: [...MAKING.build],
    lines: [
      aDraftLine({ id: anId(1), ingredientId: RUM_ID, amountText: '60 ml' }),
      aDraftLine({ id: anId(2), ingredientId: LIME_ID, amountText: '22.5 ml' }),
      aDraftLine({ id: anId(3), ingredientId: SYRUP_ID, amountText: '3/4 oz' }),
    ],
    ...over,
  };
}

/** Figures of the right shape with round values. They belong to no spec: nothing was computed. */
export function someFigures(over: Partial<Figures> = {}): Figures {
  return {
    sumOfPartsMl: 105,
    undilutedMl: 105,
    undilutedMassG: 108,
    undilutedAbvFraction: 0.23,
    contractionMl: 0,
    dilutionFraction: 0.5,
    dilutionKind: 'published',
    meltWaterMl: 52.5,
    meltWaterG: 52.4,
    topMl: 0,
    finalMl: 157.5,
    finalMassG: 160.4,
    densityGPerMl: 1.018,
    abvFraction: 0.15,
    ethanolG: 18.9,
    waterG: 125,
    sugarG: 14,
    sugarGPerL: 90,
    acidsGPerL: {
      citric: 6.4,
      malic: 2.1,
      tartaric: 0,
      lactic: 0,
      acetic: 0,
      phosphoric: 0,
      succinic: 0,
      ascorbic: 0,
    },
    acidCitricG: 1.3,
    acidCitricGPerL: 8.4,
    sugarAcidRatio: 10.7,
    energyKcal: 192,
    energyKj: 800,
    freezingPointC: -6.5,
    washLine: { fillMl: 157.5, heightMm: 55.7, brimMl: 282.7, headroomMl: 125.2 },
    allergens: { contains: [], mayContain: [], notReviewed: [] },
    warnings: [],
    ...over,
  };
}

/** Version 1 of the sour, a draft nobody has locked. Its figures are `someFigures`. */
export function aVersion(over: Partial<Version> = {}): Version {
  return {
    id: anId(301),
    revision: 1,
    specId: anId(401),
    specName: 'House sour',
    variantName: null,
    number: 1,
    state: 'draft',
    parent: null,
    why: 'first try',
    changes: [],
    author: { id: anId(501), name: 'Developer' },
    createdAt: NOW,
    lock: null,
    noteCount: 0,
    body: aSpecBody(),
    ingredients: theSourIngredients(),
    glass: aGlassSnapshot(),
    figures: someFigures(),
    calculationVersion: '1',
    houseMeasures: { ...DEFAULT_HOUSE_MEASURES },
    ...over,
  };
}
