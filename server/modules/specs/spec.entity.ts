import { type InferEntity, defineEntity, p } from '@mikro-orm/core';

import type { GlassSnapshot } from '#shared/contracts/glass.ts';
import type { DraftBody, SpecBody, VersionState } from '#shared/contracts/spec.ts';
import type { Figures, IngredientSnapshot, NoteScale } from '#shared/contracts/version.ts';
import type { HouseMeasures } from '#shared/units/house-measures.ts';

import { User } from '../accounts/account.entity.ts';
import { Team } from '../teams/team.entity.ts';

/**
 * A spec, or a variant of one: siblings share `familyId`, which is the id of the first of them.
 *
 * The `latest…`, `locked…` and headline columns repeat the newest and the locked version, written in the same
 * transaction, so that a list of specs reads one table.
 */
export const Spec = defineEntity({
  name: 'Spec',
  tableName: 'spec',
  indexes: [
    {
      name: 'spec_by_update',
      expression: 'create index "spec_by_update" on "spec" ("team_id", "updated_at" desc, "id" desc)',
    },
    {
      name: 'spec_by_name',
      expression: 'create index "spec_by_name" on "spec" ("team_id", "name" collate "und-x-icu", "id")',
    },
    {
      name: 'spec_by_abv',
      expression: 'create index "spec_by_abv" on "spec" ("team_id", coalesce("abv_fraction", -1), "id")',
    },
    {
      name: 'spec_search',
      expression: `create index "spec_search" on "spec" using gin ((lower("name" || ' ' || coalesce("variant_name", ''))) gin_trgm_ops)`,
    },
  ],
  properties: {
    id: p.uuid().primary().defaultRaw('gen_random_uuid()'),
    revision: p.integer().default(1),
    team: () => p.manyToOne(Team).deleteRule('cascade'),
    familyId: p.uuid().index(),
    name: p.string().columnType('text'),
    variantName: p.string().columnType('text').nullable(),
    description: p.string().columnType('text'),
    draft: p.json<DraftBody>(),
    draftRevision: p.integer().default(1),
    draftBaseVersionId: p.uuid().nullable(),
    branchedFromVersionId: p.uuid().nullable(),
    latestVersionId: p.uuid().nullable(),
    latestNumber: p.integer().nullable(),
    latestState: p.string().columnType('text').$type<VersionState>().nullable(),
    lockedVersionId: p.uuid().nullable(),
    lockedNumber: p.integer().nullable(),
    finalMl: p.double().$type<number>().nullable(),
    abvFraction: p.double().$type<number>().nullable(),
    sugarGPerL: p.double().$type<number>().nullable(),
    acidCitricGPerL: p.double().$type<number>().nullable(),
    createdAt: p.datetime().defaultRaw('now()'),
    updatedAt: p.datetime().defaultRaw('now()'),
    updatedBy: () => p.manyToOne(User).deleteRule('set null').nullable(),
    retiredAt: p.datetime().nullable(),
  },
});
export type Spec = InferEntity<typeof Spec>;

/** An immutable numbered state of a spec. Only its state and its lock ever change; a trigger guards the rest. */
export const SpecVersion = defineEntity({
  name: 'SpecVersion',
  tableName: 'spec_version',
  uniques: [{ properties: ['spec', 'number'] }],
  properties: {
    id: p.uuid().primary().defaultRaw('gen_random_uuid()'),
    revision: p.integer().version(),
    team: () => p.manyToOne(Team).deleteRule('cascade').index(),
    spec: () => p.manyToOne(Spec).deleteRule('cascade'),
    number: p.integer(),
    parent: () => p.manyToOne(SpecVersion).deleteRule('set null').nullable(),
    state: p.string().columnType('text').$type<VersionState>(),
    body: p.json<SpecBody>(),
    ingredients: p.json<IngredientSnapshot[]>(),
    glass: p.json<GlassSnapshot>().nullable(),
    houseMeasures: p.json<HouseMeasures>(),
    figures: p.json<Figures>(),
    calculationVersion: p.string().columnType('text'),
    why: p.string().columnType('text'),
    changes: p.json<string[]>(),
    author: () => p.manyToOne(User).deleteRule('set null').nullable(),
    createdAt: p.datetime().defaultRaw('now()'),
    lockedBy: () => p.manyToOne(User).deleteRule('set null').nullable(),
    lockedAt: p.datetime().nullable(),
    lockStatement: p.string().columnType('text').nullable(),
    lockSha256: p.string().columnType('text').nullable(),
  },
});
export type SpecVersion = InferEntity<typeof SpecVersion>;

export const TastingNote = defineEntity({
  name: 'TastingNote',
  tableName: 'tasting_note',
  indexes: [{ properties: ['version', 'createdAt'] }],
  properties: {
    id: p.uuid().primary().defaultRaw('gen_random_uuid()'),
    revision: p.integer().version(),
    team: () => p.manyToOne(Team).deleteRule('cascade').index(),
    version: () => p.manyToOne(SpecVersion).deleteRule('cascade'),
    author: () => p.manyToOne(User).deleteRule('set null').nullable(),
    scores: p.json<Record<NoteScale, number | null>>(),
    words: p.string().columnType('text'),
    createdAt: p.datetime().defaultRaw('now()'),
    updatedAt: p
      .datetime()
      .defaultRaw('now()')
      .onUpdate(() => new Date()),
  },
});
export type TastingNote = InferEntity<typeof TastingNote>;
