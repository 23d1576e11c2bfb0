import { type Static, Type } from '@sinclair/typebox';

import {
  PersonRefSchema,
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
import { AMOUNT_UNITS, AMOUNT_VALUE_RANGE } from '../units/amount.ts';
import { DILUTION_RANGES, METHODS } from '../physics/dilution.ts';

/** States of a version. A version starts as a draft and only goes forward, but a manager may undo a lock. */
export const VERSION_STATES = ['draft', 'on trial', 'locked', 'retired'] as const;
export type VersionState = (typeof VERSION_STATES)[number];

/** `mix` goes in with the ice and is diluted; `top` is added afterwards, such as soda. */
export const LINE_STAGES = ['mix', 'top'] as const;
export type LineStage = (typeof LINE_STAGES)[number];

export const MIXING_ICES = ['none', 'cubes', 'large cubes', 'cracked', 'crushed'] as const;
export const GLASS_ICES = ['none', 'cubes', 'block', 'crushed'] as const;

export const SPEC_LIMITS = { lines: 30, buildSteps: 30 } as const;

export const AmountSchema = Type.Object(
  {
    value: Type.Number({
      exclusiveMinimum: AMOUNT_VALUE_RANGE.exclusiveMin,
      maximum: AMOUNT_VALUE_RANGE.max,
      description: 'number of units',
    }),
    unit: oneOf(AMOUNT_UNITS),
  },
  { additionalProperties: false },
);

export const DilutionSchema = Type.Union(
  [
    Type.Object(
      { kind: Type.Literal('published') },
      { additionalProperties: false, description: 'the published curve of the method' },
    ),
    Type.Object(
      {
        kind: Type.Literal('weighed'),
        massBeforeG: Type.Number({
          exclusiveMinimum: 0,
          maximum: DILUTION_RANGES.massG.max,
          description: 'liquid before mixing [g]',
        }),
        massAfterG: Type.Number({
          exclusiveMinimum: 0,
          maximum: DILUTION_RANGES.massG.max,
          description: 'liquid strained [g]',
        }),
      },
      { additionalProperties: false },
    ),
    Type.Object(
      {
        kind: Type.Literal('by hand'),
        dilutionFraction: Type.Number({
          minimum: DILUTION_RANGES.dilutionFraction.min,
          maximum: DILUTION_RANGES.dilutionFraction.max,
          description: 'melt water ÷ undiluted volume',
        }),
      },
      { additionalProperties: false },
    ),
    Type.Object({ kind: Type.Literal('none') }, { additionalProperties: false }),
  ],
  { description: 'where the dilution comes from' },
);
export type DilutionChoice = Static<typeof DilutionSchema>;

const GlassIceSchema = Type.Object(
  {
    kind: oneOf(GLASS_ICES),
    massG: Type.Number({
      minimum: 0,
      maximum: 1000,
      description: 'ice in the glass, which lifts the wash line [g]',
    }),
  },
  { additionalProperties: false },
);

const LineNote = longText({ maxLength: 300, description: 'note on the line' });

/** Everything of a spec except its lines. */
const bodyMembers = {
  method: oneOf(METHODS),
  dilution: DilutionSchema,
  ice: oneOf(MIXING_ICES),
  glassId: nullable(Uuid),
  glassIce: GlassIceSchema,
  garnish: longText({ maxLength: 300, description: 'garnish' }),
  build: Type.Array(longText({ maxLength: 500, description: 'one step of the build' }), {
    maxItems: SPEC_LIMITS.buildSteps,
  }),
  partMl: Type.Number({ exclusiveMinimum: 0, maximum: 1000, description: 'what one part is [mL]' }),
};

export const SpecLineSchema = Type.Object(
  { id: Uuid, ingredientId: Uuid, amount: AmountSchema, stage: oneOf(LINE_STAGES), note: LineNote },
  { additionalProperties: false },
);
export type SpecLine = Static<typeof SpecLineSchema>;

/** A complete spec for one serve: what a version holds. */
export const SpecBodySchema = Type.Object(
  {
    lines: Type.Array(SpecLineSchema, { minItems: 1, maxItems: SPEC_LIMITS.lines }),
    ...bodyMembers,
  },
  { $id: 'SpecBody', additionalProperties: false },
);
export type SpecBody = Static<typeof SpecBodySchema>;

/** A line being written: the amount as typed, which may not be an amount yet. */
export const DraftLineSchema = Type.Object(
  {
    id: Uuid,
    ingredientId: nullable(Uuid),
    amountText: Type.String({ maxLength: 40, description: 'amount as typed' }),
    stage: oneOf(LINE_STAGES),
    note: LineNote,
  },
  { additionalProperties: false },
);
export type DraftLine = Static<typeof DraftLineSchema>;

export const DraftBodySchema = Type.Object(
  { lines: Type.Array(DraftLineSchema, { maxItems: SPEC_LIMITS.lines }), ...bodyMembers },
  { $id: 'DraftBody', additionalProperties: false },
);
export type DraftBody = Static<typeof DraftBodySchema>;

const SpecName = lineOfText({ maxLength: 120, description: 'name of the drink' });
const VariantName = lineOfText({ maxLength: 80, description: 'name of the variant' });

export const VersionRefSchema = Type.Object(
  { id: Uuid, number: Type.Integer({ minimum: 1 }), state: oneOf(VERSION_STATES) },
  { additionalProperties: false },
);
export type VersionRef = Static<typeof VersionRefSchema>;

/** A spec as lists show it. Figures are those of its newest version, null before the first. */
export const SpecSummarySchema = Type.Object(
  {
    id: Uuid,
    revision: Revision,
    familyId: Uuid,
    name: SpecName,
    variantName: nullable(VariantName),
    latestVersion: nullable(VersionRefSchema),
    lockedVersion: nullable(VersionRefSchema),
    headline: nullable(
      Type.Object(
        {
          finalMl: Type.Number(),
          abvFraction: Type.Number(),
          sugarGPerL: Type.Number(),
          acidCitricGPerL: Type.Number(),
        },
        { additionalProperties: false },
      ),
    ),
    updatedAt: Timestamp,
    updatedBy: nullable(PersonRefSchema),
    retiredAt: nullable(Timestamp),
  },
  { $id: 'SpecSummary', additionalProperties: false },
);
export type SpecSummary = Static<typeof SpecSummarySchema>;

/** A spec with its working draft. `draftRevision` guards the draft, `revision` the name. */
export const SpecSchema = Type.Object(
  {
    ...SpecSummarySchema.properties,
    description: longText({ maxLength: 1000, description: 'what the drink is for' }),
    draft: DraftBodySchema,
    draftRevision: Revision,
    draftBaseVersionId: nullable(Uuid),
    branchedFromVersionId: nullable(Uuid),
    createdAt: Timestamp,
    siblings: Type.Array(
      Type.Object(
        { id: Uuid, name: Type.String(), variantName: nullable(Type.String()) },
        { additionalProperties: false },
      ),
    ),
  },
  { $id: 'Spec', additionalProperties: false },
);
export type Spec = Static<typeof SpecSchema>;

export const SpecCreateSchema = Type.Object(
  {
    name: SpecName,
    description: Type.Optional(longText({ maxLength: 1000, description: 'what the drink is for' })),
  },
  { $id: 'SpecCreate', additionalProperties: false },
);
export type SpecCreate = Static<typeof SpecCreateSchema>;

export const SpecUpdateSchema = Type.Object(
  {
    name: SpecName,
    variantName: nullable(VariantName),
    description: longText({ maxLength: 1000, description: 'what the drink is for' }),
  },
  { $id: 'SpecUpdate', additionalProperties: false },
);
export type SpecUpdate = Static<typeof SpecUpdateSchema>;

export const SPEC_SORTS = ['-updated', 'name', '-name', 'abv', '-abv'] as const;

export const SpecListQuerySchema = Type.Object(
  {
    ...pageQueryMembers,
    search: Type.Optional(Type.String({ maxLength: 120 })),
    state: Type.Optional(oneOf(VERSION_STATES, { description: 'state of the newest version' })),
    sort: Type.Optional(oneOf(SPEC_SORTS)),
    retired: Type.Optional(oneOf(['no', 'only', 'all'])),
  },
  { $id: 'SpecListQuery', additionalProperties: false },
);
export type SpecListQuery = Static<typeof SpecListQuerySchema>;

export const SpecPageSchema = pageOf(SpecSummarySchema, { $id: 'SpecPage' });
export type SpecPage = Static<typeof SpecPageSchema>;

export const BranchSchema = Type.Object(
  { fromVersionId: Uuid, variantName: VariantName },
  { $id: 'Branch', additionalProperties: false },
);
export type Branch = Static<typeof BranchSchema>;

export const DraftFromVersionSchema = Type.Object(
  { versionId: Uuid },
  { $id: 'DraftFromVersion', additionalProperties: false },
);
export type DraftFromVersion = Static<typeof DraftFromVersionSchema>;
