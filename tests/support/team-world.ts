import { randomUUID } from 'node:crypto';

import type { Glass, GlassWrite } from '#shared/contracts/glass.ts';
import type { Ingredient, IngredientWrite } from '#shared/contracts/ingredient.ts';
import { ROLES, type Role } from '#shared/contracts/roles.ts';
import type { DraftBody, Spec } from '#shared/contracts/spec.ts';
import type { InvitationCreated } from '#shared/contracts/team.ts';
import type { Note, NoteWrite, Version } from '#shared/contracts/version.ts';
import { blankDraft } from '#shared/specs/blank-draft.ts';

import type { TestApp, TestTeam } from './app.ts';

/** A team with one of everything that has an address. Two of them hold the same names. */
export interface TeamWorld {
  team: TestTeam;
  /** The parameters of every route, by name. */
  ids: Record<string, string>;
  /** A note by each of the members, who alone may change it. */
  noteIds: Record<Role, string>;
  draft: DraftBody;
}

export const A_GLASS: GlassWrite = {
  name: 'The house coupe',
  profile: [
    { heightMm: 0, radiusMm: 5 },
    { heightMm: 30, radiusMm: 42 },
    { heightMm: 55, radiusMm: 48 },
  ],
  stemMm: 90,
};

export const AN_INGREDIENT: IngredientWrite = {
  name: 'The house rum',
  category: 'spirit',
  composition: { abvFraction: 0.4, sugarGPerL: 0, acidsGPerL: {}, densityGPerMl: null },
  knowledge: {
    abv: { how: 'label', spread: 0.01 },
    sugar: { how: 'estimate', spread: 0.1 },
    acid: { how: 'estimate', spread: 0.1 },
  },
  pieceMassG: null,
  allergens: { reviewed: true, contains: [], mayContain: [] },
  packs: [{ size: 700, sizeUnit: 'ml', price: '21.50', pricedOn: '2026-11-02' }],
  source: 'label',
  note: '',
};

export const A_NOTE: NoteWrite = {
  scores: { sweet: 5, sour: 6, bitter: null, strength: 5, texture: null, overall: 7 },
  words: 'Bright, a little thin.',
};

export async function aTeamWorld(app: TestApp): Promise<TeamWorld> {
  const team = await app.addTeam();
  const manager = team.as('manager');
  const at = `/teams/${team.id}`;
  const invite = { label: 'a new colleague', roles: ['bartender'] };
  const [ingredient, glass, { invitation, token }] = await Promise.all([
    manager.post<Ingredient>(`${at}/ingredients`, AN_INGREDIENT).then(({ body }) => body),
    manager.post<Glass>(`${at}/glasses`, A_GLASS).then(({ body }) => body),
    manager.post<InvitationCreated>(`${at}/invitations`, invite).then(({ body }) => body),
  ]);
  const { spec, version, draft } = await aSpecWithVersion(team, { ingredient, glass });
  const noteIds = await aNoteOfEach(team, version.id);
  const ids = {
    teamId: team.id,
    memberId: team.members.trainer.memberId,
    invitationId: invitation.id,
    invitationToken: token,
    ingredientId: ingredient.id,
    glassId: glass.id,
    specId: spec.id,
    versionId: version.id,
    noteId: noteIds.manager,
  };
  return { team, ids, noteIds, draft };
}

async function aNoteOfEach(team: TestTeam, versionId: string): Promise<Record<Role, string>> {
  const path = `/teams/${team.id}/versions/${versionId}/notes`;
  const pairs = ROLES.map(
    async (role) => [role, (await team.as(role).post<Note>(path, A_NOTE)).body.id] as const,
  );
  return Object.fromEntries(await Promise.all(pairs)) as Record<Role, string>;
}

async function aSpecWithVersion(
  team: TestTeam,
  { ingredient, glass }: { ingredient: Ingredient; glass: Glass },
) {
  const manager = team.as('manager');
  const specs = `/teams/${team.id}/specs`;
  const spec = (await manager.post<Spec>(specs, { name: 'The Harbour Sour' })).body;
  const line = {
    id: randomUUID(),
    ingredientId: ingredient.id,
    amountText: '60 ml',
    stage: 'mix',
    note: '',
  } as const;
  const draft: DraftBody = { ...blankDraft(), lines: [line], glassId: glass.id };
  const drafted = await manager.put<Spec>(`${specs}/${spec.id}/draft`, draft, {
    ifMatch: spec.draftRevision,
  });
  const { draftRevision } = drafted.body;
  const saved = await manager.post<Version>(
    `${specs}/${spec.id}/versions`,
    { why: 'the first try' },
    { ifMatch: draftRevision },
  );
  return { spec, version: saved.body, draft };
}
