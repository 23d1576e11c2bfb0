import { describe, expect, it } from 'vitest';

import type { SpecBody, SpecLine } from '#shared/contracts/spec.ts';
import type { Figures } from '#shared/contracts/version.ts';
import { type DescribedSide, describeChanges } from '#shared/specs/describe-changes.ts';
import {
  LIME_ID,
  RUM_ID,
  SYRUP_ID,
  aComposition,
  aGlassSnapshot,
  aLimeJuice,
  aLine,
  aRum,
  aSpecBody,
  aSyrup,
  anId,
  anIngredientSnapshot,
  frozen,
  someFigures,
  theSourIngredients,
} from '#tests/support/builders.ts';

const gin = anIngredientSnapshot({ id: anId(104), name: 'gin' });
const soda = anIngredientSnapshot({ id: anId(105), name: 'soda water' });
const ingredients = [...theSourIngredients(), gin, soda];

const rum = aLine({ id: anId(1), ingredientId: RUM_ID, amount: { value: 60, unit: 'ml' } });
const lime = aLine({ id: anId(2), ingredientId: LIME_ID, amount: { value: 22.5, unit: 'ml' } });
const syrup = aLine({ id: anId(3), ingredientId: SYRUP_ID, amount: { value: 22.5, unit: 'ml' } });

function side(over: Partial<DescribedSide> = {}): DescribedSide {
  return frozen({ body: aSpecBody(), ingredients, glass: aGlassSnapshot(), figures: someFigures(), ...over });
}

function changes(before: Partial<DescribedSide>, after: Partial<DescribedSide>): string[] {
  return describeChanges({ before: side(before), after: side(after) });
}

function lineChanges(before: SpecLine[], after: SpecLine[]): string[] {
  return changes({ body: aSpecBody({ lines: before }) }, { body: aSpecBody({ lines: after }) });
}

function bodyChanges(before: Partial<SpecBody>, after: Partial<SpecBody>): string[] {
  return changes({ body: aSpecBody(before) }, { body: aSpecBody(after) });
}

describe('nothing changed', () => {
  it('is no sentence at all', () => {
    expect(changes({}, {})).toEqual([]);
  });

  it('also when lines only got other ids, or an ingredient another revision', () => {
    const renumbered = [rum, lime, syrup].map((line, index) => ({ ...line, id: anId(50 + index) }));
    expect(lineChanges([rum, lime, syrup], renumbered)).toEqual([]);
    expect(changes({ ingredients: [aRum()] }, { ingredients: [aRum({ revision: 7 })] })).toEqual([]);
  });
});

describe('lines', () => {
  it('with another amount: the unit once', () => {
    expect(lineChanges([rum, lime], [rum, { ...lime, amount: { value: 20, unit: 'ml' } }])).toEqual([
      'lime juice 22.5 → 20 ml',
    ]);
  });

  it('in another unit: both', () => {
    const dashes = { ...lime, amount: { value: 2, unit: 'dash' } } as const;
    expect(lineChanges([dashes], [{ ...dashes, amount: { value: 1, unit: 'dash' } }])).toEqual([
      'lime juice 2 → 1 dash',
    ]);
    expect(lineChanges([dashes], [lime])).toEqual(['lime juice 2 dashes → 22.5 ml']);
    expect(lineChanges([lime], [{ ...lime, amount: { value: 1 / 3, unit: 'oz' } }])).toEqual([
      'lime juice 22.5 ml → 1/3 oz',
    ]);
  });

  it('added and removed', () => {
    const top = aLine({
      id: anId(9),
      ingredientId: soda.id,
      amount: { value: 60, unit: 'ml' },
      stage: 'top',
    });
    expect(lineChanges([rum, lime], [rum, lime, syrup, top])).toEqual([
      'added sugar syrup 22.5 ml',
      'added soda water 60 ml on top',
    ]);
    expect(lineChanges([rum, lime, syrup], [rum, syrup])).toEqual(['removed lime juice 22.5 ml']);
  });

  it('with another ingredient, as much of it or not', () => {
    const swapped = { ...rum, ingredientId: gin.id };
    expect(lineChanges([rum, lime], [swapped, lime])).toEqual(['swapped white rum for gin, 60 ml']);
    expect(lineChanges([rum], [{ ...swapped, amount: { value: 50, unit: 'ml' } }])).toEqual([
      'swapped white rum 60 ml for gin 50 ml',
    ]);
  });

  it('in another order: those that moved, and where to', () => {
    expect(lineChanges([rum, lime, syrup], [lime, syrup, rum])).toEqual([
      'white rum moved after sugar syrup',
    ]);
    expect(lineChanges([rum, lime, syrup], [syrup, rum, lime])).toEqual(['sugar syrup moved to the start']);
  });

  it('keep their order when others come and go between them', () => {
    const first = aLine({ id: anId(9), ingredientId: gin.id, amount: { value: 1, unit: 'dash' } });
    expect(lineChanges([rum, lime, syrup], [first, rum, syrup])).toEqual([
      'added gin 1 dash',
      'removed lime juice 22.5 ml',
    ]);
  });

  it('at another stage', () => {
    expect(lineChanges([rum, lime], [rum, { ...lime, stage: 'top' }])).toEqual([
      'lime juice is now added on top',
    ]);
    expect(lineChanges([rum, { ...lime, stage: 'top' }], [rum, lime])).toEqual([
      'lime juice now goes into the mix',
    ]);
  });

  it('with another note', () => {
    expect(lineChanges([lime], [{ ...lime, note: 'strained' }])).toEqual([
      'note on lime juice added: “strained”',
    ]);
  });

  it('of an ingredient the version does not carry are told all the same', () => {
    const result = changes(
      { body: aSpecBody({ lines: [rum] }), ingredients: [] },
      { body: aSpecBody({ lines: [{ ...rum, amount: { value: 50, unit: 'ml' } }] }), ingredients: [] },
    );
    expect(result).toEqual(['an unknown ingredient 60 → 50 ml']);
  });
});

describe('the making', () => {
  it('by another method, dilution and ice', () => {
    expect(bodyChanges({ method: 'shake' }, { method: 'stir' })).toEqual(['method shake → stir']);
    expect(bodyChanges({ ice: 'cubes' }, { ice: 'cracked' })).toEqual(['mixing ice cubes → cracked']);
    expect(
      bodyChanges(
        { dilution: { kind: 'published' } },
        { dilution: { kind: 'weighed', massBeforeG: 108, massAfterG: 160.5 } },
      ),
    ).toEqual(['dilution by the published curve → weighed (108 g in, 160.5 g strained)']);
    expect(
      bodyChanges({ dilution: { kind: 'by hand', dilutionFraction: 0.25 } }, { dilution: { kind: 'none' } }),
    ).toEqual(['dilution 25 % by hand → none']);
  });

  it('in another glass, with other ice in it', () => {
    const coupe = aGlassSnapshot({ id: anId(202), name: 'coupe' });
    expect(changes({}, { glass: coupe })).toEqual(['glass tumbler → coupe']);
    expect(changes({ glass: null }, { glass: coupe })).toEqual(['glass none → coupe']);
    expect(changes({ glass: coupe }, { glass: null })).toEqual(['glass coupe → none']);
    expect(
      bodyChanges({ glassIce: { kind: 'none', massG: 0 } }, { glassIce: { kind: 'block', massG: 60 } }),
    ).toEqual(['ice in the glass none → block 60 g']);
  });

  it('in a glass that was measured again or renamed', () => {
    const profile = [
      { heightMm: 0, radiusMm: 30 },
      { heightMm: 98, radiusMm: 30 },
    ];
    expect(changes({}, { glass: aGlassSnapshot({ profile, brimMl: 277.09 }) })).toEqual([
      'tumbler measured again: brim 283 → 277 ml',
    ]);
    expect(changes({}, { glass: aGlassSnapshot({ name: 'low tumbler' }) })).toEqual([
      'glass renamed tumbler → low tumbler',
    ]);
  });

  it('with another garnish', () => {
    expect(bodyChanges({ garnish: 'mint' }, { garnish: '' })).toEqual(['garnish removed: “mint”']);
    expect(bodyChanges({ garnish: 'mint' }, { garnish: 'lime' })).toEqual(['garnish “mint” → “lime”']);
  });

  it('by other steps', () => {
    const build = (...steps: string[]) => ({ build: steps });
    expect(bodyChanges(build('a', 'b'), build('a', 'x', 'b'))).toEqual(['build step 2 added: “x”']);
    expect(bodyChanges(build('a', 'x', 'b'), build('a', 'b'))).toEqual(['build step 2 removed: “x”']);
    expect(bodyChanges(build('a', 'b', 'c'), build('a', 'y', 'c'))).toEqual(['build step 2 “b” → “y”']);
    expect(bodyChanges(build('a', 'b', 'c'), build('a', 'c', 'b'))).toEqual([
      'build: same steps in another order',
    ]);
    expect(bodyChanges(build(), build('a', 'b'))).toEqual([
      'build step 1 added: “a”',
      'build step 2 added: “b”',
    ]);
    expect(bodyChanges(build('a'), build('a', 'a'))).toEqual(['build step 2 added: “a”']);
  });

  it('with another part, where a line is written in parts', () => {
    const lines = [{ ...rum, amount: { value: 2, unit: 'part' } } as const];
    expect(bodyChanges({ partMl: 30, lines }, { partMl: 25, lines })).toEqual(['one part 30 ml → 25 ml']);
    expect(bodyChanges({ partMl: 30 }, { partMl: 25 })).toEqual([]);
  });
});

describe('an ingredient', () => {
  it('that was measured again', () => {
    const before = aLimeJuice();
    const after = aLimeJuice({
      composition: aComposition({
        sugarGPerL: 16,
        acidsGPerL: { citric: 43, malic: 15 },
        densityGPerMl: 1.035,
      }),
      pieceMassG: 30,
    });
    expect(changes({ ingredients: [before] }, { ingredients: [after] })).toContain(
      'lime juice measured again: citric acid 45 → 43 g/L, density not given → 1.035 g/ml, one piece not given → 30 g',
    );
  });

  it('with another strength or sugar', () => {
    const after = [aRum({ composition: aComposition({ abvFraction: 0.425, sugarGPerL: 4 }) })];
    expect(changes({ ingredients: [aRum()] }, { ingredients: after })).toContain(
      'white rum measured again: ABV 40 → 42.5 %, sugar 0 → 4 g/L',
    );
  });

  it('that was renamed', () => {
    expect(changes({ ingredients: [aRum()] }, { ingredients: [aRum({ name: 'house rum' })] })).toContain(
      'renamed white rum → house rum',
    );
  });

  it('whose allergens were reviewed: never none before that', () => {
    const before = aSyrup({ allergens: { reviewed: false, contains: [], mayContain: [] } });
    const after = aSyrup({ allergens: { reviewed: true, contains: ['sulphites'], mayContain: ['nuts'] } });
    const sentences = (from: typeof before, to: typeof before) =>
      changes({ ingredients: [from] }, { ingredients: [to] }).filter((text) => text.startsWith('allergens'));
    expect(sentences(before, after)).toEqual([
      'allergens of sugar syrup: not reviewed → contains sulphites; may contain nuts',
    ]);
    expect(sentences(before, aSyrup())).toEqual(['allergens of sugar syrup: not reviewed → none']);
  });
});

describe('the figures that moved', () => {
  function figureChanges(before: Partial<Figures>, after: Partial<Figures>): string[] {
    return changes({ figures: someFigures(before) }, { figures: someFigures(after) });
  }

  it('come with both values and their unit', () => {
    expect(figureChanges({ acidCitricGPerL: 8.4 }, { acidCitricGPerL: 7.6 })).toEqual([
      'final acid 8.4 → 7.6 g/L',
    ]);
    expect(figureChanges({ abvFraction: 0.182 }, { abvFraction: 0.175 })).toEqual([
      'final ABV 18.2 → 17.5 %',
    ]);
    expect(figureChanges({ finalMl: 118 }, { finalMl: 121.3 })).toEqual(['final volume 118 → 121 ml']);
    expect(figureChanges({ sugarAcidRatio: 7.9 }, { sugarAcidRatio: 10.2 })).toEqual([
      'ratio 7.9 → 10.2 : 1',
    ]);
    expect(figureChanges({ sugarAcidRatio: null }, { sugarAcidRatio: 10.2 })).toEqual([
      'ratio none → 10.2 : 1',
    ]);
    expect(figureChanges({ dilutionFraction: 0.5 }, { dilutionFraction: 0.4 })).toEqual([
      'dilution 50.0 → 40.0 %',
    ]);
  });

  it('are only those that show', () => {
    expect(figureChanges({ finalMl: 118, energyKcal: 190 }, { finalMl: 118.2, energyKcal: 250 })).toEqual([]);
  });

  it('leave out a dilution that somebody set: it was told already', () => {
    const set = { dilutionKind: 'by hand' } as const;
    expect(figureChanges({ ...set, dilutionFraction: 0.5 }, { ...set, dilutionFraction: 0.4 })).toEqual([]);
  });

  it('leave out the room to the brim of a glass that is new', () => {
    const washLine = { fillMl: 150, heightMm: 61, brimMl: 180, headroomMl: 30 };
    expect(figureChanges({ washLine: null }, { washLine })).toEqual([]);
    expect(figureChanges({ washLine }, { washLine: { ...washLine, headroomMl: 20 } })).toEqual([
      'left to the brim 30.0 → 20.0 ml',
    ]);
  });

  it('end with what the drink contains now, and no longer', () => {
    const allergens = (contains: Figures['allergens']['contains']) => ({
      allergens: { contains, mayContain: [], notReviewed: [] },
    });
    expect(figureChanges(allergens(['eggs']), allergens(['milk', 'nuts']))).toEqual([
      'now contains milk, nuts',
      'no longer contains eggs',
    ]);
  });

  it('come after what somebody did', () => {
    const lines = [rum, { ...lime, amount: { value: 20, unit: 'ml' } } as const, syrup];
    expect(
      changes({}, { body: aSpecBody({ lines }), figures: someFigures({ acidCitricGPerL: 7.6 }) }),
    ).toEqual(['lime juice 22.5 → 20 ml', 'final acid 8.4 → 7.6 g/L']);
  });
});
