import { type InferEntity, defineEntity, p } from '@mikro-orm/core';

import type {
  AllergenReview,
  CompositionKnowledge,
  IngredientCategory,
  Pack,
} from '#shared/contracts/ingredient.ts';
import type { AcidsGPerL } from '#shared/physics/composition.ts';

import { Team } from '../teams/team.entity.ts';

export const Ingredient = defineEntity({
  name: 'Ingredient',
  tableName: 'ingredient',
  indexes: [
    {
      name: 'ingredient_by_name',
      expression:
        'create index "ingredient_by_name" on "ingredient" ("team_id", "name" collate "und-x-icu", "id")',
    },
    {
      name: 'ingredient_search',
      expression: 'create index "ingredient_search" on "ingredient" using gin (lower("name") gin_trgm_ops)',
    },
  ],
  properties: {
    id: p.uuid().primary().defaultRaw('gen_random_uuid()'),
    revision: p.integer().version(),
    team: () => p.manyToOne(Team).deleteRule('cascade'),
    name: p.string().columnType('text'),
    category: p.string().columnType('text').$type<IngredientCategory>(),
    abvFraction: p.double().$type<number>(),
    sugarGPerL: p.double().$type<number>(),
    acidsGPerL: p.json<AcidsGPerL>(),
    /** Sum of the acids as citric [g/L], kept so that lists can sort by it. */
    acidCitricGPerL: p.double().$type<number>(),
    densityGPerMl: p.double().$type<number>().nullable(),
    knowledge: p.json<CompositionKnowledge>(),
    pieceMassG: p.double().$type<number>().nullable(),
    allergens: p.json<AllergenReview>(),
    packs: p.json<Pack[]>(),
    source: p.string().columnType('text'),
    note: p.string().columnType('text'),
    retiredAt: p.datetime().nullable(),
    createdAt: p.datetime().defaultRaw('now()'),
    updatedAt: p
      .datetime()
      .defaultRaw('now()')
      .onUpdate(() => new Date()),
  },
});
export type Ingredient = InferEntity<typeof Ingredient>;
