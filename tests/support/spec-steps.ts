import { randomUUID } from 'node:crypto';

import type { Glass } from '#shared/contracts/glass.ts';
import type { Ingredient, IngredientWrite } from '#shared/contracts/ingredient.ts';
import type { DraftBody, DraftLine, Spec } from '#shared/contracts/spec.ts';
import type { Version } from '#shared/contracts/version.ts';
import { blankDraft } from '#shared/specs/blank-draft.ts';

import type { TestApp, TestTeam } from './app.ts';
import type { Answer } from './client.ts';
import { A_GLASS, AN_INGREDIENT } from './team-world.ts';

/** A team with the ingredients of a sour and a glass: where a test of specs begins. */
export interface Workplace {
  team: TestTeam;
  /** Address of the team, under /api. */
  at: string;
  rum: Ingredient;
  lime: Ingredient;
  syrup: Ingredient;
  glass: Glass;
}

/** Something that could be on a back bar; a test states what matters to it. */
export function anIngredientWrite(over: Partial<IngredientWrite> = {}): IngredientWrite {
  return { ...structuredClone(AN_INGREDIENT), ...over };
}

export function aCompositionOf(over: Partial<IngredientWrite['composition']> = {}) {
  return { abvFraction: 0, sugarGPerL: 0, acidsGPerL: {}, densityGPerMl: null, ...over };
}

export async function addIngredient(team: TestTeam, over: Partial<IngredientWrite>): Promise<Ingredient> {
  const path = `/teams/${team.id}/ingredients`;
  return (await team.as('developer').post<Ingredient>(path, anIngredientWrite(over))).body;
}

export async function aWorkplace(app: TestApp): Promise<Workplace> {
  const team = await app.addTeam();
  const at = `/teams/${team.id}`;
  const rum = await addIngredient(team, {
    name: 'White rum',
    composition: aCompositionOf({ abvFraction: 0.4 }),
  });
  const lime = await addIngredient(team, {
    name: 'Lime juice',
    category: 'juice',
    composition: aCompositionOf({ sugarGPerL: 17, acidsGPerL: { citric: 45, malic: 4 } }),
  });
  const syrup = await addIngredient(team, {
    name: 'Sugar syrup',
    category: 'syrup',
    composition: aCompositionOf({ sugarGPerL: 615 }),
  });
  const glass = (await team.as('developer').post<Glass>(`${at}/glasses`, A_GLASS)).body;
  return { team, at, rum, lime, syrup, glass };
}

export function draftLine(ingredient: Ingredient | null, amountText: string): DraftLine {
  return { id: randomUUID(), ingredientId: ingredient?.id ?? null, amountText, stage: 'mix', note: '' };
}

/** The sour of the place: rum 60, lime 22.5, syrup 22.5 ml, shaken. */
export function aSourDraft(place: Workplace, over: Partial<DraftBody> = {}): DraftBody {
  const lines = [
    draftLine(place.rum, '60 ml'),
    draftLine(place.lime, '22.5 ml'),
    draftLine(place.syrup, '22.5 ml'),
  ];
  return { ...blankDraft(), lines, ...over };
}

export async function startSpec({ team, at }: Workplace, name = 'House sour'): Promise<Spec> {
  return (await team.as('developer').post<Spec>(`${at}/specs`, { name })).body;
}

/** Replaces the draft, whatever its revision, as the developer. */
export async function writeDraft(place: Workplace, specId: string, draft: DraftBody): Promise<Spec> {
  const spec = await readSpec(place, specId);
  return (await putDraft(place, { specId, draft, ifMatch: spec.draftRevision })).body;
}

export function putDraft(
  { team, at }: Workplace,
  { specId, draft, ifMatch }: { specId: string; draft: DraftBody; ifMatch: number },
): Promise<Answer<Spec>> {
  return team.as('developer').put<Spec>(`${at}/specs/${specId}/draft`, draft, { ifMatch });
}

export async function readSpec({ team, at }: Workplace, specId: string): Promise<Spec> {
  return (await team.as('developer').get<Spec>(`${at}/specs/${specId}`)).body;
}

/** Saves the draft as it stands as the next version, as the developer. */
export async function save(place: Workplace, specId: string, why = 'to try it'): Promise<Version> {
  const { draftRevision } = await readSpec(place, specId);
  return (await trySave(place, { specId, why, ifMatch: draftRevision })).body;
}

export function trySave(
  { team, at }: Workplace,
  { specId, why = 'to try it', ifMatch }: { specId: string; why?: string; ifMatch: number },
): Promise<Answer<Version>> {
  return team.as('developer').post<Version>(`${at}/specs/${specId}/versions`, { why }, { ifMatch });
}

/** A spec whose draft is the sour, saved as version 1. */
export async function aSavedSour(
  place: Workplace,
  name?: string,
): Promise<{ specId: string; version: Version; draft: DraftBody }> {
  const { id: specId } = await startSpec(place, name);
  const draft = aSourDraft(place);
  await writeDraft(place, specId, draft);
  return { specId, version: await save(place, specId), draft };
}

/** What the history says of a thing, the newest first, with plain spaces. */
export async function historyOf({ team, at }: Pick<Workplace, 'team' | 'at'>, subjectId: string) {
  const query = { subjectId };
  const page = await team
    .as('manager')
    .get<{ items: { action: string; summary: string }[] }>(`${at}/history`, { query });
  return page.body.items.map(({ action, summary }) => `${action}: ${summary}`.replaceAll(/\p{Zs}/gu, ' '));
}
