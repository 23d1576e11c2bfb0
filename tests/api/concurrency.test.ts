import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { Page } from '#shared/contracts/common.ts';
import type { Ingredient, IngredientImportResult } from '#shared/contracts/ingredient.ts';
import type { Spec } from '#shared/contracts/spec.ts';
import type { Version, VersionList } from '#shared/contracts/version.ts';

import { type TestApp, startTestApp } from '#tests/support/app.ts';
import type { Answer } from '#tests/support/client.ts';
import {
  type Workplace,
  aCompositionOf,
  aSavedSour,
  aSourDraft,
  aWorkplace,
  addIngredient,
  anIngredientWrite,
  putDraft,
  readSpec,
  save,
  startSpec,
  trySave,
  writeDraft,
} from '#tests/support/spec-steps.ts';

let app: TestApp;
let place: Workplace;
beforeAll(async () => {
  app = await startTestApp();
  place = await aWorkplace(app);
});
afterAll(() => app.stop());

/** More at once than the server has connections to the database. */
const CROWD = 25;

/** The statuses of answers to requests sent at once, sorted. */
async function statuses(requests: Promise<Answer<unknown>>[]): Promise<number[]> {
  return (await Promise.all(requests)).map(({ status }) => status).sort();
}

function crowd<Result>(request: (n: number) => Promise<Result>): Promise<Result>[] {
  return Array.from({ length: CROWD }, (_, n) => request(n));
}

const oneOf = (winner: number, others: number) => [
  winner,
  ...Array.from({ length: CROWD - 1 }, () => others),
];

describe('many people saving the same at once', () => {
  it('a draft: one wins, every other one is told so and gets the draft as it now stands', async () => {
    const { id: specId, draftRevision } = await startSpec(place);
    const answers = await Promise.all(
      crowd((n) =>
        putDraft(place, {
          specId,
          draft: aSourDraft(place, { garnish: `garnish ${n}` }),
          ifMatch: draftRevision,
        }),
      ),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual(oneOf(200, 412));
    const { draft } = await readSpec(place, specId);
    for (const { status, ...answer } of answers.map((answer) => ({
      status: answer.status,
      problem: answer.isProblem ? answer.problem : null,
    }))) {
      if (status !== 412) continue;
      expect(answer.problem).toMatchObject({ name: 'stale-version', currentRevision: draftRevision + 1 });
      expect((answer.problem?.current as Spec).draft.garnish).toBe(draft.garnish);
    }
  });

  it('a version: one version comes of it, numbered 1', async () => {
    const { id: specId } = await startSpec(place);
    const { draftRevision } = await writeDraft(place, specId, aSourDraft(place));
    const sent = crowd((n) => trySave(place, { specId, why: `try ${n}`, ifMatch: draftRevision }));
    expect(await statuses(sent)).toEqual(oneOf(201, 412));
    const list = await place.team.as('developer').get<VersionList>(`${place.at}/specs/${specId}/versions`);
    expect(list.body.items.map(({ number }) => number)).toEqual([1]);
  });

  it('an ingredient: one wins, every other one is told so with the ingredient as it now stands', async () => {
    const ingredient = await addIngredient(place.team, { name: 'Contested gin' });
    const path = `${place.at}/ingredients/${ingredient.id}`;
    const answers = await Promise.all(
      crowd((n) =>
        place.team
          .as('developer')
          .put<Ingredient>(path, anIngredientWrite({ name: 'Contested gin', note: `note ${n}` }), {
            ifMatch: ingredient.revision,
          }),
      ),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual(oneOf(200, 412));
    const { note } = (await place.team.as('developer').get<Ingredient>(path)).body;
    const losers = answers.filter(({ status }) => status === 412);
    expect(new Set(losers.map(({ problem }) => (problem.current as Ingredient).note))).toEqual(
      new Set([note]),
    );
  });

  it('a lock: one signs, every other one is told so', async () => {
    const { version } = await aSavedSour(place);
    const sent = crowd(() =>
      place.team
        .as('menu-writer')
        .post<Version>(`${place.at}/versions/${version.id}/lock`, { confirmed: true }, { ifMatch: 1 }),
    );
    expect(await statuses(sent)).toEqual(oneOf(200, 412));
  });
});

describe('two things at once that may not both be', () => {
  it('two versions of a spec locked together leave one locked, the other retired or refused', async () => {
    const { specId, version: first } = await aSavedSour(place);
    const second = await save(place, specId, 'the same again');
    await Promise.all(
      [first, second].map(({ id }) =>
        place.team
          .as('manager')
          .post<Version>(`${place.at}/versions/${id}/lock`, { confirmed: true }, { ifMatch: 1 }),
      ),
    );
    const list = await place.team.as('developer').get<VersionList>(`${place.at}/specs/${specId}/versions`);
    const locked = list.body.items.filter(({ state }) => state === 'locked');
    expect(locked).toHaveLength(1);
    expect((await readSpec(place, specId)).lockedVersion?.id).toBe(locked[0]?.id);
  });

  it('one name given to many new ingredients leaves one of that name', async () => {
    const write = (n: number) =>
      anIngredientWrite({ name: n % 2 === 0 ? 'Same name' : 'SAME NAME', note: `${n}` });
    const sent = crowd((n) =>
      place.team.as('developer').post<Ingredient>(`${place.at}/ingredients`, write(n)),
    );
    expect(await statuses(sent)).toEqual(oneOf(201, 409));
    const query = { search: 'same name' };
    const page = await place.team.as('developer').get<Page<Ingredient>>(`${place.at}/ingredients`, { query });
    expect(page.body.items).toHaveLength(1);
  });

  it('two imports of one file add its rows once', async () => {
    const names = Array.from({ length: 40 }, (_, n) => `Imported at once ${n}`);
    const csv = `name,category\n${names.map((name) => `${name},spirit`).join('\n')}\n`;
    const answers = await Promise.all(
      [1, 2, 3].map(() =>
        place.team.as('developer').post<IngredientImportResult>(`${place.at}/ingredients/import`, { csv }),
      ),
    );
    for (const { status } of answers) expect([200, 409, 412]).toContain(status);
    const query = { search: 'imported at once', limit: 200 };
    const page = await place.team.as('developer').get<Page<Ingredient>>(`${place.at}/ingredients`, { query });
    expect(page.body.items.map(({ name }) => name).sort()).toEqual(names.toSorted());
  });

  it('an ingredient changed while an import rewrites it is not overwritten unseen', async () => {
    const { id, revision } = await addIngredient(place.team, { name: 'Raced bitters' });
    const path = `${place.at}/ingredients/${id}`;
    const csv = 'name,note\nRaced bitters,from the file\n';
    const [edited, imported] = await Promise.all([
      place.team
        .as('manager')
        .put<Ingredient>(
          path,
          anIngredientWrite({ name: 'Raced bitters', composition: aCompositionOf({ abvFraction: 0.44 }) }),
          { ifMatch: revision },
        ),
      place.team.as('developer').post<IngredientImportResult>(`${place.at}/ingredients/import`, { csv }),
    ]);
    const now = (await place.team.as('developer').get<Ingredient>(path)).body;
    if (edited.status === 200) expect(now.composition.abvFraction).toBe(0.44);
    else expect(edited.problem.name).toBe('stale-version');
    if (imported.status === 200) expect(now.note).toBe('from the file');
    else expect(imported.problem.name).toBe('stale-version');
    expect([edited, imported].some(({ status }) => status === 200)).toBe(true);
  });
});
