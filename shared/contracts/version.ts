import { type Static, Type } from '@sinclair/typebox';

import { ACID_KEYS } from '../physics/composition.ts';
import {
  PersonRefSchema,
  Revision,
  Timestamp,
  Uuid,
  lineOfText,
  longText,
  nullable,
  oneOf,
} from './common.ts';
import { GlassSnapshotSchema } from './glass.ts';
import { ALLERGENS, AllergenReviewSchema, CompositionSchema, INGREDIENT_CATEGORIES } from './ingredient.ts';
import { SpecBodySchema, VERSION_STATES } from './spec.ts';

/** An ingredient as a version remembers it, so that old figures can be explained and computed again. */
export const IngredientSnapshotSchema = Type.Object(
  {
    id: Uuid,
    revision: Revision,
    name: Type.String(),
    category: oneOf(INGREDIENT_CATEGORIES),
    composition: CompositionSchema,
    pieceMassG: nullable(Type.Number()),
    allergens: AllergenReviewSchema,
  },
  { additionalProperties: false },
);
export type IngredientSnapshot = Static<typeof IngredientSnapshotSchema>;

const acidsGPerL = Type.Object(
  Object.fromEntries(ACID_KEYS.map((acid) => [acid, Type.Number()])) as Record<
    (typeof ACID_KEYS)[number],
    ReturnType<typeof Type.Number>
  >,
  { additionalProperties: false },
);

export const CalculationWarningSchema = Type.Object(
  {
    code: oneOf(['extrapolated', 'no-published-curve', 'lighter-than-composition', 'overflows', 'mass-lost']),
    quantity: Type.String(),
    value: nullable(Type.Number()),
    min: nullable(Type.Number()),
    max: nullable(Type.Number()),
    detail: Type.String({ description: 'one sentence for a person' }),
  },
  { additionalProperties: false },
);
export type CalculationWarning = Static<typeof CalculationWarningSchema>;

export const FiguresSchema = Type.Object(
  {
    sumOfPartsMl: Type.Number({ description: 'line volumes of the mix, merely added [mL]' }),
    undilutedMl: Type.Number({ description: 'volume of the mix before ice [mL at 20 C]' }),
    undilutedMassG: Type.Number(),
    undilutedAbvFraction: Type.Number(),
    contractionMl: Type.Number({
      description: 'volumes of mix, melt water and top merely added, less the volume they make [mL]',
    }),
    dilutionFraction: Type.Number({ description: 'melt water ÷ undiluted volume' }),
    dilutionKind: oneOf(['published', 'weighed', 'by hand', 'none']),
    meltWaterMl: Type.Number(),
    meltWaterG: Type.Number(),
    topMl: Type.Number({ description: 'lines added after mixing [mL]' }),
    finalMl: Type.Number({ description: 'finished drink [mL at 20 C]' }),
    finalMassG: Type.Number(),
    densityGPerMl: Type.Number(),
    abvFraction: Type.Number(),
    ethanolG: Type.Number(),
    waterG: Type.Number(),
    sugarG: Type.Number(),
    sugarGPerL: Type.Number(),
    acidsGPerL,
    acidCitricG: Type.Number({ description: 'titratable acid as citric, all species [g]' }),
    acidCitricGPerL: Type.Number(),
    sugarAcidRatio: nullable(Type.Number({ description: 'sugar ÷ acid as citric; null without acid' })),
    energyKcal: Type.Number(),
    energyKj: Type.Number(),
    freezingPointC: nullable(Type.Number({ description: 'null outside the tables' })),
    washLine: nullable(
      Type.Object(
        {
          fillMl: Type.Number({ description: 'drink and submerged ice [mL]' }),
          heightMm: Type.Number({ description: 'height of the surface above the inside bottom [mm]' }),
          brimMl: Type.Number(),
          headroomMl: Type.Number({ description: 'left to the brim; negative when it overflows [mL]' }),
        },
        { additionalProperties: false },
      ),
    ),
    allergens: Type.Object(
      {
        contains: Type.Array(oneOf(ALLERGENS)),
        mayContain: Type.Array(oneOf(ALLERGENS)),
        notReviewed: Type.Array(Type.String(), { description: 'names of ingredients nobody has reviewed' }),
      },
      { additionalProperties: false },
    ),
    warnings: Type.Array(CalculationWarningSchema),
  },
  { additionalProperties: false },
);
export type Figures = Static<typeof FiguresSchema>;

/** What was signed when a version was locked. */
const LockSchema = Type.Object(
  {
    by: nullable(PersonRefSchema),
    at: Timestamp,
    statement: Type.String({ description: 'what the signer confirmed' }),
    sha256: Type.String({ description: 'digest of the snapshot that was signed' }),
  },
  { additionalProperties: false },
);

const versionMembers = {
  id: Uuid,
  revision: Revision,
  specId: Uuid,
  specName: Type.String(),
  variantName: nullable(Type.String()),
  number: Type.Integer({ minimum: 1 }),
  state: oneOf(VERSION_STATES),
  parent: nullable(
    Type.Object(
      { id: Uuid, specId: Uuid, number: Type.Integer(), variantName: nullable(Type.String()) },
      { additionalProperties: false },
    ),
  ),
  why: Type.String(),
  changes: Type.Array(Type.String(), { description: 'what changed against the parent, in words' }),
  author: nullable(PersonRefSchema),
  createdAt: Timestamp,
  lock: nullable(LockSchema),
  noteCount: Type.Integer(),
};

export const VersionSchema = Type.Object(
  {
    ...versionMembers,
    body: SpecBodySchema,
    ingredients: Type.Array(IngredientSnapshotSchema),
    glass: nullable(GlassSnapshotSchema),
    figures: FiguresSchema,
    calculationVersion: Type.String(),
    houseMeasures: Type.Object(
      { dashMl: Type.Number(), barSpoonMl: Type.Number(), dropMl: Type.Number() },
      { additionalProperties: false },
    ),
  },
  { $id: 'Version', additionalProperties: false },
);
export type Version = Static<typeof VersionSchema>;

export const VersionListSchema = Type.Object(
  { items: Type.Array(VersionSchema) },
  { $id: 'VersionList', additionalProperties: false },
);
export type VersionList = Static<typeof VersionListSchema>;

export const COMPARE_LIMITS = { min: 2, max: 4 } as const;

const UUID_PATTERN = '[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}';

export const CompareQuerySchema = Type.Object(
  {
    ids: Type.String({
      pattern: `^${UUID_PATTERN}(,${UUID_PATTERN}){0,3}$`,
      description: 'one to four version ids, separated by commas',
    }),
  },
  { $id: 'CompareQuery', additionalProperties: false },
);
export type CompareQuery = Static<typeof CompareQuerySchema>;

/** Saves the working draft as the next version. */
export const VersionCreateSchema = Type.Object(
  { why: lineOfText({ maxLength: 500, description: 'why it changed' }) },
  { $id: 'VersionCreate', additionalProperties: false },
);
export type VersionCreate = Static<typeof VersionCreateSchema>;

const Reason = Type.Optional(longText({ maxLength: 500, description: 'why' }));

/** Draft to on trial and back. Locking and retiring have requests of their own. */
export const VersionStateChangeSchema = Type.Object(
  { state: oneOf(['draft', 'on trial']), reason: Reason },
  { $id: 'VersionStateChange', additionalProperties: false },
);
export type VersionStateChange = Static<typeof VersionStateChangeSchema>;

/** Takes a version out of use, for good: it stays readable, and may become the base of a new one. */
export const VersionRetireSchema = Type.Object(
  { reason: Reason },
  { $id: 'VersionRetire', additionalProperties: false },
);
export type VersionRetire = Static<typeof VersionRetireSchema>;

export const LockRequestSchema = Type.Object(
  { confirmed: Type.Literal(true, { description: 'the signer has seen what is being signed' }) },
  { $id: 'LockRequest', additionalProperties: false },
);
export type LockRequest = Static<typeof LockRequestSchema>;

export const UnlockRequestSchema = Type.Object(
  { reason: lineOfText({ maxLength: 500, description: 'why the lock is undone' }) },
  { $id: 'UnlockRequest', additionalProperties: false },
);
export type UnlockRequest = Static<typeof UnlockRequestSchema>;

export const NOTE_SCALES = ['sweet', 'sour', 'bitter', 'strength', 'texture', 'overall'] as const;
export type NoteScale = (typeof NOTE_SCALES)[number];
export const NOTE_SCORE_RANGE = { min: 0, max: 10 } as const;

const noteMembers = {
  scores: Type.Object(
    Object.fromEntries(
      NOTE_SCALES.map((scale) => [
        scale,
        nullable(
          Type.Integer({
            minimum: NOTE_SCORE_RANGE.min,
            maximum: NOTE_SCORE_RANGE.max,
            description: `${scale}, 0 to 10; null: not scored`,
          }),
        ),
      ]),
    ) as Record<NoteScale, ReturnType<typeof nullable<ReturnType<typeof Type.Integer>>>>,
    { additionalProperties: false },
  ),
  words: longText({ maxLength: 2000, description: 'the note in words' }),
};

export const NoteSchema = Type.Object(
  {
    id: Uuid,
    revision: Revision,
    versionId: Uuid,
    author: nullable(PersonRefSchema),
    ...noteMembers,
    createdAt: Timestamp,
    updatedAt: Timestamp,
  },
  { $id: 'Note', additionalProperties: false },
);
export type Note = Static<typeof NoteSchema>;

export const NoteWriteSchema = Type.Object(noteMembers, { $id: 'NoteWrite', additionalProperties: false });
export type NoteWrite = Static<typeof NoteWriteSchema>;

export const NoteListSchema = Type.Object(
  { items: Type.Array(NoteSchema) },
  { $id: 'NoteList', additionalProperties: false },
);
export type NoteList = Static<typeof NoteListSchema>;
