import type { Allergen, IngredientWrite } from '#shared/contracts/ingredient.ts';
import type { AcidsGPerL } from '#shared/physics/composition.ts';

/** House preps of the demo team, made from what its kitchen would throw away. Invented, with plausible bench values. */
export const DEMO_PREPS: readonly IngredientWrite[] = [
  prep({
    name: 'Grapefruit husk cordial',
    sugarGPerL: 430,
    acidsGPerL: { citric: 34, malic: 6 },
    note: 'Husks of the breakfast juice, drawn with sugar and acids overnight. Keep cold, use within 10 days.',
  }),
  prep({
    name: 'Pineapple core syrup',
    sugarGPerL: 560,
    acidsGPerL: { citric: 8, malic: 2 },
    note: 'Cores and trimmings, pressed and sweetened by weight.',
  }),
  prep({
    name: 'Spent-coffee rum',
    category: 'spirit',
    abvFraction: 0.392,
    note: 'Espresso pucks steeped in aged rum for six hours, filtered. The wet grounds take the strength down a little.',
  }),
  prep({
    name: 'Whey and lemon-peel cordial',
    sugarGPerL: 310,
    acidsGPerL: { citric: 12, lactic: 9 },
    contains: ['milk'],
    note: 'Whey from the kitchen’s curd. Milk stays milk, however clear it is.',
  }),
  prep({
    name: 'Rhubarb trim shrub',
    sugarGPerL: 340,
    acidsGPerL: { malic: 9, acetic: 13 },
    note: 'Stalk ends with cider vinegar, strained after two days. Leaves never go in.',
  }),
  prep({
    name: 'Bread-crust vermouth',
    category: 'aromatised wine',
    abvFraction: 0.162,
    sugarGPerL: 150,
    acidsGPerL: { tartaric: 3, malic: 1.5, lactic: 0.8, acetic: 0.5 },
    contains: ['gluten', 'sulphites'],
    note: 'Toasted crusts of yesterday’s rye in sweet vermouth, twelve hours, filtered.',
  }),
  prep({
    name: 'Citrus-leaf saline',
    category: 'seasoning',
    note: '20 g of salt in 80 g of water that held lemon leaves.',
  }),
];

function prep(input: {
  name: string;
  category?: IngredientWrite['category'];
  abvFraction?: number;
  sugarGPerL?: number;
  acidsGPerL?: AcidsGPerL;
  contains?: Allergen[];
  note: string;
}): IngredientWrite {
  const measured = (spread: number) => ({ how: 'measured' as const, spread });
  return {
    name: input.name,
    category: input.category ?? 'syrup',
    composition: {
      abvFraction: input.abvFraction ?? 0,
      sugarGPerL: input.sugarGPerL ?? 0,
      acidsGPerL: input.acidsGPerL ?? {},
      densityGPerMl: null,
    },
    knowledge: { abv: measured(0.02), sugar: measured(0.05), acid: measured(0.08) },
    pieceMassG: null,
    allergens: { reviewed: true, contains: input.contains ?? [], mayContain: [] },
    source: 'Bench values of the house, mean of three lots',
    note: input.note,
    packs: [],
  };
}

/** What the demo team has checked on its shelf: allergens reviewed, and what a pack costs. */
export const DEMO_PACKS: Readonly<Record<string, { sizeMl: number; price: string }>> = {
  'White rum': { sizeMl: 700, price: '17.50' },
  'Aged rum': { sizeMl: 700, price: '24.00' },
  'Gin (London-dry type)': { sizeMl: 700, price: '19.80' },
  'Sweet red vermouth': { sizeMl: 750, price: '9.40' },
  'Dry vermouth': { sizeMl: 750, price: '8.90' },
  'Amaro, medium': { sizeMl: 700, price: '18.20' },
  'Aromatic bitters': { sizeMl: 200, price: '12.60' },
  'Simple syrup 1:1 by mass': { sizeMl: 1000, price: '1.10' },
  'Lime juice, fresh': { sizeMl: 1000, price: '9.20' },
  'Soda water': { sizeMl: 1000, price: '0.70' },
};
