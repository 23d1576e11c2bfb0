import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { Page } from '#shared/contracts/common.ts';
import { SPEC_SORTS, type SpecSummary } from '#shared/contracts/spec.ts';

import { type TestApp, startTestApp } from '#tests/support/app.ts';
import type { Answer } from '#tests/support/client.ts';
import {
  type Workplace,
  aSourDraft,
  aWorkplace,
  draftLine,
  readSpec,
  save,
  startSpec,
  writeDraft,
} from '#tests/support/spec-steps.ts';

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
});
afterAll(() => app.stop());

describe('the list of specs', () => {
  let own: Workplace;
  const NAMES = ['Anchor', 'anchor too', 'Äther', 'Buoy', 'Cleat 100%', 'Dinghy'];
  beforeAll(async () => {
    own = await aWorkplace(app);
    for (const [index, name] of NAMES.toReversed().entries()) {
      const { id } = await startSpec(own, name);
      if (index % 2 === 1) continue;
      const lines = [draftLine(own.rum, `${20 + 20 * index} ml`), draftLine(own.syrup, '20 ml')];
      await writeDraft(own, id, aSourDraft(own, { lines, dilution: { kind: 'none' } }));
      await save(own, id);
    }
    const retired = await startSpec(own, 'Retired anchor');
    await own.team.as('manager').post(`${own.at}/specs/${retired.id}/retire`, undefined, { ifMatch: 1 });
  });

  type Query = Record<string, string | number>;
  const list = (query: Query = {}): Promise<Answer<Page<SpecSummary>>> =>
    own.team.as('bartender').get<Page<SpecSummary>>(`${own.at}/specs`, { query });
  const names = async (query: Query) => (await list(query)).body.items.map(({ name }) => name);

  it('begins with what was changed last', async () => {
    expect((await names({}))[0]).toBe('Anchor');
    const { id } = (await list({ search: 'dinghy' })).body.items[0]!;
    await writeDraft(own, id, aSourDraft(own));
    expect((await names({}))[0]).toBe('Dinghy');
  });

  it('is sorted by name as people sort, both ways', async () => {
    expect(await names({ sort: 'name' })).toEqual(NAMES);
    expect(await names({ sort: '-name' })).toEqual(NAMES.toReversed());
  });

  it('is sorted by strength, those without a version as the weakest', async () => {
    const strengths = (await list({ sort: 'abv' })).body.items.map(
      ({ headline }) => headline?.abvFraction ?? -1,
    );
    expect(strengths).toEqual(strengths.toSorted((a, b) => a - b));
    expect(strengths.filter((value) => value === -1)).toHaveLength(3);
    const reverse = (await list({ sort: '-abv' })).body.items.map(
      ({ headline }) => headline?.abvFraction ?? -1,
    );
    expect(reverse).toEqual(strengths.toReversed());
  });

  it.each(SPEC_SORTS.flatMap((sort) => [1, 2, 6].map((limit) => [sort, limit] as const)))(
    'by %s in pages of %i comes complete and without repeats',
    async (sort, limit) => {
      const whole = (await list({ sort })).body.items.map(({ id }) => id);
      const found: string[] = [];
      let cursor: string | null = null;
      do {
        const page: Page<SpecSummary> = (await list({ sort, limit, ...(cursor !== null && { cursor }) }))
          .body;
        found.push(...page.items.map(({ id }) => id));
        cursor = page.nextCursor;
      } while (cursor !== null && found.length < 50);
      expect(found).toEqual(whole);
    },
  );

  it('is searched in names and variants, to the letter', async () => {
    expect(await names({ search: 'ANCHOR', sort: 'name' })).toEqual(['Anchor', 'anchor too']);
    expect(await names({ search: '%' })).toEqual(['Cleat 100%']);
    expect(await names({ search: '_' })).toEqual([]);
    const { id } = (await list({ search: 'buoy' })).body.items[0]!;
    const renamed = { name: 'Buoy', variantName: 'Midnight', description: '' };
    const { revision } = await readSpec(own, id);
    await own.team.as('developer').put(`${own.at}/specs/${id}`, renamed, { ifMatch: revision });
    expect(await names({ search: 'midn' })).toEqual(['Buoy']);
  });

  it('is filtered by the state of the newest version', async () => {
    expect(await names({ state: 'draft', sort: 'name' })).toHaveLength(3);
    expect(await names({ state: 'locked' })).toEqual([]);
  });

  it('gives the retired alone, or with the others', async () => {
    expect(await names({ retired: 'only' })).toEqual(['Retired anchor']);
    expect(await names({ retired: 'all' })).toHaveLength(NAMES.length + 1);
  });

  it('shows the headline figures of the newest version', async () => {
    const [spec] = (await list({ search: 'dinghy' })).body.items;
    // 20 ml at 40 % and 20 ml of syrup, undiluted: 8 ml of ethanol and 12.3 g of sugar in at most 40 ml.
    expect(spec?.headline?.finalMl).toBeGreaterThan(39.5);
    expect(spec?.headline?.finalMl).toBeLessThan(40);
    expect(spec?.headline?.abvFraction).toBeCloseTo(8 / spec!.headline!.finalMl, 4);
    expect(spec?.headline?.sugarGPerL).toBeCloseTo(12_300 / spec!.headline!.finalMl, 1);
    expect(spec?.latestVersion).toMatchObject({ number: 1, state: 'draft' });
  });

  const encoded = (value: unknown) => Buffer.from(JSON.stringify(value)).toString('base64url');
  it.each([
    [{ sort: 'colour' }, '#/sort enum'],
    [{ state: 'lost' }, '#/state enum'],
    [{ limit: 0 }, '#/limit minimum'],
    [{ cursor: 'rubbish' }, '#/cursor cursor'],
    [{ sort: 'abv', cursor: encoded(['abv', 'strong', randomUUID()]) }, '#/cursor cursor'],
    [{ sort: 'name', cursor: encoded(['name', 4, randomUUID()]) }, '#/cursor cursor'],
    [{ cursor: encoded(['-updated', 'soon', randomUUID()]) }, '#/cursor cursor'],
  ])('asked for as %j is refused at the field', async (query, expected) => {
    const answer = await list(query);
    expect(answer.status).toBe(422);
    expect(answer.fieldErrors).toEqual([expected]);
  });
});
