import { randomUUID } from 'node:crypto';

import type { EntityManager } from '@mikro-orm/postgresql';

import type { Ingredient as IngredientResource, IngredientWrite } from '#shared/contracts/ingredient.ts';
import type { FieldError } from '#shared/contracts/problem.ts';
import { ACID_KEYS } from '#shared/physics/composition.ts';
import { fitOfComposition } from '#shared/physics/contents.ts';

import { problems } from '../../http/problems.ts';
import { flushBased, refuseStale } from '../../http/revision.ts';
import type { ActingContext } from '../../http/route.ts';
import { recordEvent } from '../teams/index.ts';
import { describeIngredientChange } from './ingredient.changes.ts';
import { Ingredient } from './ingredient.entity.ts';
import { columnsOf, toIngredient, toIngredientWrite } from './ingredient.mapper.ts';
import { findNamesake, loadIngredient } from './ingredient.queries.ts';

export async function addIngredient(
  context: ActingContext,
  write: IngredientWrite,
): Promise<IngredientResource> {
  const { em, teamId, roles } = context;
  refuseNonsense(write);
  await refuseNamesake(em, { teamId, name: write.name, exceptId: null });
  const ingredient = em.create(Ingredient, { id: randomUUID(), team: teamId, ...columnsOf(write) });
  recordIngredientEvent(context, {
    ingredient,
    action: 'ingredient.added',
    summary: `Added ${ingredient.name}`,
  });
  await em.flush();
  return toIngredient(ingredient, roles);
}

export async function changeIngredient(
  context: ActingContext,
  { ingredientId, write, ifMatch }: { ingredientId: string; write: IngredientWrite; ifMatch: number },
): Promise<IngredientResource> {
  const { em, teamId, roles } = context;
  const ingredient = await loadIngredient(em, { teamId, ingredientId });
  refuseStale(ingredient, { ifMatch, current: () => toIngredient(ingredient, roles) });
  refuseNonsense(write);
  if (!ingredient.retiredAt) await refuseNamesake(em, { teamId, name: write.name, exceptId: ingredientId });
  const before = toIngredientWrite(ingredient);
  em.assign(ingredient, columnsOf(write), { mergeObjectProperties: false });
  const summary = describeIngredientChange(before, toIngredientWrite(ingredient));
  if (summary === null) return toIngredient(ingredient, roles);
  recordIngredientEvent(context, { ingredient, action: 'ingredient.changed', summary });
  await flushIngredient(context, ingredientId);
  return toIngredient(ingredient, roles);
}

export async function setIngredientRetired(
  context: ActingContext,
  { ingredientId, retired, ifMatch }: { ingredientId: string; retired: boolean; ifMatch: number },
): Promise<IngredientResource> {
  const { em, teamId, roles, now } = context;
  const ingredient = await loadIngredient(em, { teamId, ingredientId });
  refuseStale(ingredient, { ifMatch, current: () => toIngredient(ingredient, roles) });
  if (!retired) await refuseNamesake(em, { teamId, name: ingredient.name, exceptId: ingredientId });
  ingredient.retiredAt = retired ? now() : null;
  const action = retired ? 'ingredient.retired' : 'ingredient.restored';
  const summary = `${retired ? 'Retired' : 'Brought back'} ${ingredient.name}`;
  recordIngredientEvent(context, { ingredient, action, summary });
  await flushIngredient(context, ingredientId);
  return toIngredient(ingredient, roles);
}

function flushIngredient({ em, teamId, roles }: ActingContext, ingredientId: string): Promise<void> {
  return flushBased(em, async (fresh) =>
    toIngredient(await loadIngredient(fresh, { teamId, ingredientId }), roles),
  );
}

/** What no schema can tell: parts that do not fit into a litre, an allergen in both lists. */
export function nonsenseIn(write: IngredientWrite): FieldError[] {
  const errors: FieldError[] = [];
  const fit = fitOfComposition(write.composition);
  if (!fit.ok) {
    errors.push({
      pointer: pointerOfQuantity(fit.quantity),
      code: 'does-not-fit',
      detail: `The parts do not fit into a litre together: ${fit.quantity} comes to ${fit.value.toPrecision(4)}, possible is ${fit.min.toPrecision(4)} to ${fit.max.toPrecision(4)}.`,
    });
  }
  const { contains, mayContain } = write.allergens;
  for (const allergen of contains.filter((name) => mayContain.includes(name))) {
    const index = mayContain.indexOf(allergen);
    const detail = `${allergen} is under both contains and may contain; contains is enough.`;
    errors.push({ pointer: `#/allergens/mayContain/${index}`, code: 'twice', detail });
  }
  return errors;
}

function pointerOfQuantity(quantity: string): string {
  const member = ['abvFraction', 'sugarGPerL', 'densityGPerMl'].find((name) => name === quantity);
  if (member !== undefined) return `#/composition/${member}`;
  const acid = ACID_KEYS.find((name) => name === quantity);
  return acid === undefined ? '#/composition' : `#/composition/acidsGPerL/${acid}`;
}

function refuseNonsense(write: IngredientWrite): void {
  const errors = nonsenseIn(write);
  if (errors.length > 0) throw problems.invalidFields(errors);
}

async function refuseNamesake(
  em: EntityManager,
  input: { teamId: string; name: string; exceptId: string | null },
): Promise<void> {
  const namesake = await findNamesake(em, input);
  if (namesake === null) return;
  const detail = `The back bar already has ${namesake.name}. Give this one another name.`;
  throw problems.alreadyExists('ingredient', detail, namesake.id);
}

function recordIngredientEvent(
  { em, teamId, person }: ActingContext,
  { ingredient, action, summary }: { ingredient: Ingredient; action: string; summary: string },
): void {
  recordEvent(em, { teamId, person, action, subjectType: 'ingredient', subjectId: ingredient.id, summary });
}
