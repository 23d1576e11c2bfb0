import { randomUUID } from 'node:crypto';

import type { EntityManager } from '@mikro-orm/postgresql';

import type { Ingredient as IngredientResource, IngredientWrite } from '#shared/contracts/ingredient.ts';
import type { FieldError } from '#shared/contracts/problem.ts';
import { ACID_KEYS } from '#shared/physics/composition.ts';
import { fitOfComposition } from '#shared/physics/contents.ts';

import { problems } from '../../http/problems.ts';
import { refuseStale } from '../../http/revision.ts';
import type { ActingContext } from '../../http/route.ts';
import { recordEvent } from '../teams/index.ts';
import { describeIngredientChange } from './ingredient.changes.ts';
import { Ingredient } from './ingredient.entity.ts';
import { columnsOf, toIngredient, toIngredientWrite } from './ingredient.mapper.ts';
import { findNamesake, holdBackBar, loadIngredient } from './ingredient.queries.ts';

export function addIngredient(context: ActingContext, write: IngredientWrite): Promise<IngredientResource> {
  return changeBackBar(context, async (inside) => {
    const { em, teamId, roles } = inside;
    refuseNonsense(write);
    await refuseNamesake(em, { teamId, name: write.name, exceptId: null });
    const ingredient = em.create(Ingredient, { id: randomUUID(), team: teamId, ...columnsOf(write) });
    const summary = `Added ${ingredient.name}`;
    recordIngredientEvent(inside, { ingredient, action: 'ingredient.added', summary });
    await em.flush();
    return toIngredient(ingredient, roles);
  });
}

interface Guard {
  ingredientId: string;
  ifMatch: number;
}

export function changeIngredient(
  context: ActingContext,
  { write, ...guard }: Guard & { write: IngredientWrite },
): Promise<IngredientResource> {
  return changeBackBar(context, async (inside) => {
    const { em, teamId, roles } = inside;
    const ingredient = await loadGuarded(inside, guard);
    refuseNonsense(write);
    const exceptId = guard.ingredientId;
    if (!ingredient.retiredAt) await refuseNamesake(em, { teamId, name: write.name, exceptId });
    const columns = columnsOf(write);
    const summary = describeIngredientChange(toIngredientWrite(ingredient), toIngredientWrite(columns));
    if (summary === null) return toIngredient(ingredient, roles);
    em.assign(ingredient, columns, { mergeObjectProperties: false });
    recordIngredientEvent(inside, { ingredient, action: 'ingredient.changed', summary });
    await em.flush();
    return toIngredient(ingredient, roles);
  });
}

export function setIngredientRetired(
  context: ActingContext,
  { retired, ...guard }: Guard & { retired: boolean },
): Promise<IngredientResource> {
  return changeBackBar(context, async (inside) => {
    const { em, teamId, roles, now } = inside;
    const ingredient = await loadGuarded(inside, guard);
    if ((ingredient.retiredAt != null) === retired) return toIngredient(ingredient, roles);
    const exceptId = guard.ingredientId;
    if (!retired) await refuseNamesake(em, { teamId, name: ingredient.name, exceptId });
    ingredient.retiredAt = retired ? now() : null;
    const action = retired ? 'ingredient.retired' : 'ingredient.restored';
    const summary = `${retired ? 'Retired' : 'Brought back'} ${ingredient.name}`;
    recordIngredientEvent(inside, { ingredient, action, summary });
    await em.flush();
    return toIngredient(ingredient, roles);
  });
}

/** Runs a change of the back bar in a transaction, after those of other people and before the next. */
export function changeBackBar<Result>(
  context: ActingContext,
  change: (inside: ActingContext) => Promise<Result>,
): Promise<Result> {
  return context.em.transactional(async (em) => {
    await holdBackBar(em, context.teamId);
    return change({ ...context, em });
  });
}

/** The ingredient as it is now, unless the edit is based on an earlier revision. */
async function loadGuarded({ em, teamId, roles }: ActingContext, guard: Guard): Promise<Ingredient> {
  const ingredient = await loadIngredient(em, { teamId, ingredientId: guard.ingredientId });
  refuseStale(ingredient, { ifMatch: guard.ifMatch, current: () => toIngredient(ingredient, roles) });
  return ingredient;
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
  { em, teamId, person, now }: ActingContext,
  { ingredient, action, summary }: { ingredient: Ingredient; action: string; summary: string },
): void {
  const subject = { subjectType: 'ingredient', subjectId: ingredient.id };
  recordEvent(em, { teamId, person, action, ...subject, summary, at: now() });
}
