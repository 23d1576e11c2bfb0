import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { Spec } from '#shared/contracts/spec.ts';
import type { VersionList } from '#shared/contracts/version.ts';

import { type TestApp, startTestApp } from '#tests/support/app.ts';
import {
  type Workplace,
  aSavedSour,
  aWorkplace,
  historyOf,
  readSpec,
  save,
  startSpec,
} from '#tests/support/spec-steps.ts';

let app: TestApp;
let place: Workplace;
beforeAll(async () => {
  app = await startTestApp();
  place = await aWorkplace(app);
});
afterAll(() => app.stop());

const listOf = (specId: string) =>
  place.team.as('bartender').get<VersionList>(`${place.at}/specs/${specId}/versions`);
const compare = (ids: string) =>
  place.team.as('bartender').get<VersionList>(`${place.at}/versions`, { query: { ids } });

describe('comparing versions', () => {
  it('gives them in the order asked for, of one spec or several', async () => {
    const first = await aSavedSour(place);
    const second = await aSavedSour(place, 'Another');
    const third = await save(place, first.specId, 'once more');
    const wanted = [third.id, second.version.id, first.version.id];
    const { body } = await compare(wanted.join(','));
    expect(body.items.map(({ id }) => id)).toEqual(wanted);
    expect(body.items[1]).toEqual(second.version);
  });

  it('gives one asked for twice once', async () => {
    const { version } = await aSavedSour(place);
    expect((await compare(`${version.id},${version.id}`)).body.items).toHaveLength(1);
  });

  it('with one that is another team’s or nowhere is not found', async () => {
    const { version } = await aSavedSour(place);
    const theirs = await aSavedSour(await aWorkplace(app));
    for (const id of [theirs.version.id, randomUUID()]) {
      expect((await compare(`${version.id},${id}`)).problem).toMatchObject({ name: 'not-found', id });
    }
  });

  const five = Array.from({ length: 5 }, () => randomUUID()).join(',');
  it.each(['', 'a,b', five, '-'.repeat(36), `${randomUUID()},`])(
    'as “%s” is refused in words',
    async (ids) => {
      const answer = await compare(ids);
      expect([404, 422]).toContain(answer.status);
      if (answer.status === 422) expect(answer.fieldErrors[0]).toMatch(/^#\/ids /);
    },
  );

  it('of a spec that is not there lists nothing but a problem', async () => {
    expect((await listOf(randomUUID())).problem).toMatchObject({ name: 'not-found', resource: 'spec' });
  });
});

describe('branching a variant', () => {
  const branch = (specId: string, body: unknown) =>
    place.team.as('developer').post<Spec>(`${place.at}/specs/${specId}/branch`, body);

  it('makes a sibling whose draft is the version, and whose first version names it as parent', async () => {
    const { specId, version } = await aSavedSour(place, 'Origin');
    const { body } = await branch(specId, { fromVersionId: version.id, variantName: ' winter ' });
    expect(body).toMatchObject({
      name: 'Origin',
      variantName: 'winter',
      familyId: specId,
      draftBaseVersionId: version.id,
      branchedFromVersionId: version.id,
      latestVersion: null,
      siblings: [{ id: specId, name: 'Origin', variantName: null }],
    });
    expect((await readSpec(place, specId)).siblings).toEqual([
      { id: body.id, name: 'Origin', variantName: 'winter' },
    ]);
    expect(await save(place, body.id)).toMatchObject({
      number: 1,
      variantName: 'winter',
      parent: { id: version.id, specId, number: 1, variantName: null },
      changes: [],
    });
    expect(await historyOf(place, body.id)).toContain(
      'spec.branched: Branched Origin (winter) from Origin version 1',
    );
  });

  it('of a variant stays in the family', async () => {
    const { specId, version } = await aSavedSour(place);
    const child = (await branch(specId, { fromVersionId: version.id, variantName: 'a' })).body;
    const childVersion = await save(place, child.id);
    const grandchild = (await branch(child.id, { fromVersionId: childVersion.id, variantName: 'b' })).body;
    expect(grandchild.familyId).toBe(specId);
    expect(grandchild.siblings.map(({ id }) => id)).toEqual([specId, child.id]);
  });

  it('from a version of another spec or team is not found', async () => {
    const { specId } = await aSavedSour(place);
    const other = await aSavedSour(place);
    const theirs = await aSavedSour(await aWorkplace(app));
    for (const { version } of [other, theirs]) {
      const answer = await branch(specId, { fromVersionId: version.id, variantName: 'x' });
      expect(answer.problem).toMatchObject({ name: 'not-found', resource: 'version' });
    }
  });

  it.each([
    [{ variantName: 'x' }, '#/fromVersionId required'],
    [{ fromVersionId: 'x', variantName: 'x' }, '#/fromVersionId format'],
    [{ fromVersionId: randomUUID() }, '#/variantName required'],
    [{ fromVersionId: randomUUID(), variantName: ' ' }, '#/variantName pattern'],
  ])('as %j is refused at the field', async (body, expected) => {
    const { id } = await startSpec(place);
    expect((await branch(id, body)).fieldErrors).toContain(expected);
  });
});
