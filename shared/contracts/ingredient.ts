import { type Static, type TInteger, type TOptional, Type } from '@sinclair/typebox';

import { ACID_KEYS, type AcidKey, COMPOSITION_RANGES } from '../physics/composition.ts';
import {
  CalendarDate,
  Revision,
  Timestamp,
  Uuid,
  lineOfText,
  longText,
  nullable,
  oneOf,
  pageOf,
  pageQueryMembers,
} from './common.ts';

export const INGREDIENT_CATEGORIES = [
  'spirit',
  'liqueur',
  'aromatised wine',
  'fortified wine',
  'wine',
  'bitters',
  'beer',
  'juice',
  'syrup',
  'acid',
  'vinegar',
  'coffee and tea',
  'dairy and egg',
  'mixer',
  'seasoning',
  'other',
] as const;
export type IngredientCategory = (typeof INGREDIENT_CATEGORIES)[number];

/** How a value of a composition came to be known. */
export const KNOWN_BY = ['label', 'measured', 'handbook', 'estimate'] as const;
export type KnownBy = (typeof KNOWN_BY)[number];

/** The 14 groups of Regulation (EU) No 1169/2011, Annex II, in its order. */
export const ALLERGENS = [
  'gluten',
  'crustaceans',
  'eggs',
  'fish',
  'peanuts',
  'soybeans',
  'milk',
  'nuts',
  'celery',
  'mustard',
  'sesame',
  'sulphites',
  'lupin',
  'molluscs',
] as const;
export type Allergen = (typeof ALLERGENS)[number];

/** The 9 major food allergens of the United States (FALCPA 2004, FASTER Act 2021), by the EU group that covers each. */
export const US_MAJOR_ALLERGENS = [
  'gluten',
  'crustaceans',
  'eggs',
  'fish',
  'peanuts',
  'soybeans',
  'milk',
  'nuts',
  'sesame',
] as const satisfies readonly Allergen[];

function acidConcentration(acid: AcidKey) {
  return Type.Optional(
    Type.Number({
      minimum: COMPOSITION_RANGES.acidGPerL.min,
      maximum: COMPOSITION_RANGES.acidGPerL.max,
      description: `${acid} acid [g/L]`,
    }),
  );
}

export const AcidsSchema = Type.Object(
  Object.fromEntries(ACID_KEYS.map((acid) => [acid, acidConcentration(acid)])) as Record<
    AcidKey,
    ReturnType<typeof acidConcentration>
  >,
  { additionalProperties: false, description: 'acids by species [g/L]' },
);

export const CompositionSchema = Type.Object(
  {
    abvFraction: Type.Number({
      minimum: COMPOSITION_RANGES.abvFraction.min,
      maximum: COMPOSITION_RANGES.abvFraction.max,
      description: 'ethanol by volume at 20 C [0 to 1]',
    }),
    sugarGPerL: Type.Number({
      minimum: COMPOSITION_RANGES.sugarGPerL.min,
      maximum: COMPOSITION_RANGES.sugarGPerL.max,
      description: 'sugar [g/L]',
    }),
    acidsGPerL: AcidsSchema,
    densityGPerMl: nullable(
      Type.Number({
        minimum: COMPOSITION_RANGES.densityGPerMl.min,
        maximum: COMPOSITION_RANGES.densityGPerMl.max,
        description: 'density at 20 C [g/mL]; null is computed',
      }),
    ),
  },
  { additionalProperties: false },
);

const KnowledgeSchema = Type.Object(
  {
    how: oneOf(KNOWN_BY),
    spread: Type.Number({
      minimum: 0,
      maximum: 1,
      description: 'relative half-width that holds about 90 % of cases [0 to 1]',
    }),
  },
  { additionalProperties: false },
);

export const CompositionKnowledgeSchema = Type.Object(
  { abv: KnowledgeSchema, sugar: KnowledgeSchema, acid: KnowledgeSchema },
  { additionalProperties: false },
);
export type CompositionKnowledge = Static<typeof CompositionKnowledgeSchema>;

export const AllergenReviewSchema = Type.Object(
  {
    reviewed: Type.Boolean({ description: 'false: nobody has checked; never shown as none' }),
    contains: Type.Array(oneOf(ALLERGENS), { uniqueItems: true, maxItems: ALLERGENS.length }),
    mayContain: Type.Array(oneOf(ALLERGENS), { uniqueItems: true, maxItems: ALLERGENS.length }),
  },
  { additionalProperties: false },
);
export type AllergenReview = Static<typeof AllergenReviewSchema>;

/** Money is text, so that no digit is lost between PostgreSQL numeric and JSON. */
export const Money = Type.String({
  pattern: '^\\d{1,9}(\\.\\d{1,4})?$',
  description: 'amount of money, decimal text',
});

export const PackSchema = Type.Object(
  {
    size: Type.Number({
      exclusiveMinimum: 0,
      maximum: 1_000_000,
      description: 'contents, in the unit of sizeUnit',
    }),
    sizeUnit: oneOf(['ml', 'g', 'piece']),
    price: nullable(Money),
    pricedOn: nullable(CalendarDate),
  },
  { additionalProperties: false },
);
export type Pack = Static<typeof PackSchema>;

const ingredientMembers = {
  name: lineOfText({ maxLength: 120, description: 'name of the ingredient' }),
  category: oneOf(INGREDIENT_CATEGORIES),
  composition: CompositionSchema,
  knowledge: CompositionKnowledgeSchema,
  pieceMassG: nullable(
    Type.Number({ exclusiveMinimum: 0, maximum: 10_000, description: 'usable mass of one piece [g]' }),
  ),
  allergens: AllergenReviewSchema,
  source: longText({ maxLength: 600, description: 'where the values come from' }),
  note: longText({ maxLength: 2000, description: 'notes' }),
};

export const IngredientSchema = Type.Object(
  {
    id: Uuid,
    revision: Revision,
    ...ingredientMembers,
    computedDensityGPerMl: Type.Number({ description: 'density in use: given, or computed [g/mL]' }),
    packs: nullable(Type.Array(PackSchema)),
    retiredAt: nullable(Timestamp),
    createdAt: Timestamp,
    updatedAt: Timestamp,
  },
  {
    $id: 'Ingredient',
    additionalProperties: false,
    description: 'packs is null for roles that may not see costs',
  },
);
export type Ingredient = Static<typeof IngredientSchema>;

export const IngredientWriteSchema = Type.Object(
  { ...ingredientMembers, packs: Type.Array(PackSchema, { maxItems: 20 }) },
  { $id: 'IngredientWrite', additionalProperties: false },
);
export type IngredientWrite = Static<typeof IngredientWriteSchema>;

export const INGREDIENT_SORTS = [
  'name',
  '-name',
  'abv',
  '-abv',
  'sugar',
  '-sugar',
  'acid',
  '-acid',
  '-updated',
] as const;

export const IngredientListQuerySchema = Type.Object(
  {
    ...pageQueryMembers,
    search: Type.Optional(Type.String({ maxLength: 120 })),
    category: Type.Optional(oneOf(INGREDIENT_CATEGORIES)),
    sort: Type.Optional(oneOf(INGREDIENT_SORTS)),
    retired: Type.Optional(oneOf(['no', 'only', 'all'])),
  },
  { $id: 'IngredientListQuery', additionalProperties: false },
);
export type IngredientListQuery = Static<typeof IngredientListQuerySchema>;

export const IngredientPageSchema = pageOf(IngredientSchema, { $id: 'IngredientPage' });
export type IngredientPage = Static<typeof IngredientPageSchema>;

/** Columns of the CSV that is exported and taken back, in order. */
export const INGREDIENT_CSV_COLUMNS = [
  'name',
  'category',
  'abv_percent',
  'sugar_g_per_l',
  ...ACID_KEYS.map((acid) => `${acid}_g_per_l` as const),
  'density_g_per_ml',
  'abv_known_by',
  'abv_spread_percent',
  'sugar_known_by',
  'sugar_spread_percent',
  'acid_known_by',
  'acid_spread_percent',
  'piece_mass_g',
  'allergens_reviewed',
  'allergens_contains',
  'allergens_may_contain',
  'packs',
  'source',
  'note',
] as const;
export type IngredientCsvColumn = (typeof INGREDIENT_CSV_COLUMNS)[number];

export const CSV_IMPORT_LIMITS = { maxCharacters: 1_000_000, maxRows: 2000 } as const;

const CsvText = Type.String({
  maxLength: CSV_IMPORT_LIMITS.maxCharacters,
  description: 'the CSV file as text',
});
const CsvMapping = Type.Object(
  Object.fromEntries(
    INGREDIENT_CSV_COLUMNS.map((column) => [
      column,
      Type.Optional(Type.Integer({ minimum: 0, maximum: 200 })),
    ]),
  ) as Record<IngredientCsvColumn, TOptional<TInteger>>,
  { additionalProperties: false, description: 'column of the file (from 0) for each of our columns' },
);

export const IngredientImportRequestSchema = Type.Object(
  { csv: CsvText, mapping: Type.Optional(CsvMapping) },
  { $id: 'IngredientImportRequest', additionalProperties: false },
);
export type IngredientImportRequest = Static<typeof IngredientImportRequestSchema>;

const ImportErrorSchema = Type.Object(
  {
    row: Type.Integer({ minimum: 1, description: 'line of the file, the heading being line 1' }),
    column: nullable(Type.String()),
    value: Type.String(),
    detail: Type.String(),
  },
  { additionalProperties: false },
);

/** What an import would do. Nothing is written by a preview. */
export const IngredientImportPreviewSchema = Type.Object(
  {
    headings: Type.Array(Type.String()),
    mapping: CsvMapping,
    rows: Type.Array(
      Type.Object(
        {
          row: Type.Integer({ minimum: 1 }),
          action: oneOf(['create', 'update', 'unchanged', 'refuse']),
          name: Type.String(),
          ingredient: nullable(IngredientWriteSchema),
        },
        { additionalProperties: false },
      ),
    ),
    errors: Type.Array(ImportErrorSchema),
    counts: Type.Object(
      {
        create: Type.Integer(),
        update: Type.Integer(),
        unchanged: Type.Integer(),
        refuse: Type.Integer(),
      },
      { additionalProperties: false },
    ),
  },
  { $id: 'IngredientImportPreview', additionalProperties: false },
);
export type IngredientImportPreview = Static<typeof IngredientImportPreviewSchema>;

export const IngredientImportResultSchema = Type.Object(
  { created: Type.Integer(), updated: Type.Integer(), unchanged: Type.Integer() },
  { $id: 'IngredientImportResult', additionalProperties: false },
);
export type IngredientImportResult = Static<typeof IngredientImportResultSchema>;
