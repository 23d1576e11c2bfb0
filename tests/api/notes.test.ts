import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';

import { ROLES, type Role } from '#shared/contracts/roles.ts';
import type { Note, NoteList, Version } from '#shared/contracts/version.ts';

import { type TestApp, startTestApp } from '#tests/support/app.ts';
import { type Workplace, aSavedSour, aWorkplace, historyOf } from '#tests/support/spec-steps.ts';
import { A_NOTE } from '#tests/support/team-world.ts';

let app: TestApp;
let place: Workplace;
let specId: string;
let version: Version;
let at: string;
beforeAll(async () => {
  app = await startTestApp();
  place = await aWorkplace(app);
});
afterAll(() => app.stop());
beforeEach(async () => {
  ({ specId, version } = await aSavedSour(place));
  at = `${place.at}/versions/${version.id}/notes`;
});

const NO_SCORES = { sweet: null, sour: null, bitter: null, strength: null, texture: null, overall: null };

const add = (role: Role, body: unknown = A_NOTE) => place.team.as(role).post<Note>(at, body);
const list = async () => (await place.team.as('bartender').get<NoteList>(at)).body.items;
const change = (role: Role, note: Pick<Note, 'id' | 'revision'>, body: unknown) =>
  place.team.as(role).put<Note>(`${at}/${note.id}`, body, { ifMatch: note.revision });
const remove = (role: Role, note: Pick<Note, 'id' | 'revision'>) =>
  place.team.as(role).delete<undefined>(`${at}/${note.id}`, { ifMatch: note.revision });

describe('adding a tasting note', () => {
  it.each(ROLES)('is for everybody in the team, such as a %s, and says who and when', async (role) => {
    const answer = await add(role);
    expect(answer.headers['etag']).toBe('"1"');
    expect(answer.body).toMatchObject({
      ...A_NOTE,
      revision: 1,
      versionId: version.id,
      author: { id: place.team.members[role].id, name: place.team.members[role].name },
    });
    expect(Math.abs(Date.parse(answer.body.createdAt) - Date.now())).toBeLessThan(60_000);
    expect(await list()).toEqual([answer.body]);
  });

  it('by several people lists the newest first and counts them on the version', async () => {
    for (const role of ['trainer', 'bartender', 'developer'] as const) {
      await add(role, { scores: NO_SCORES, words: role });
    }
    expect((await list()).map(({ words }) => words)).toEqual(['developer', 'bartender', 'trainer']);
    const read = await place.team.as('bartender').get<Version>(`${place.at}/versions/${version.id}`);
    expect(read.body.noteCount).toBe(3);
    expect((await historyOf(place, specId))[0]).toBe('note.added: Noted a tasting of House sour version 1');
  });

  it.each([
    ['only words', { scores: NO_SCORES, words: 'Thin.' }],
    ['only one score', { scores: { ...NO_SCORES, overall: 0 }, words: '' }],
    ['words of several lines', { scores: NO_SCORES, words: 'Thin.\nBut long. 🍋' }],
  ])('may be %s', async (_what, body) => {
    expect((await add('bartender', body)).body).toMatchObject(body);
  });

  it.each([
    ['nothing in it', { scores: NO_SCORES, words: '' }, '#/words empty'],
    ['only blanks in it', { scores: NO_SCORES, words: ' \n ' }, '#/words empty'],
    ['a score of 11', { scores: { ...NO_SCORES, sweet: 11 }, words: '' }, '#/scores/sweet maximum'],
    ['a score of -1', { scores: { ...NO_SCORES, sour: -1 }, words: '' }, '#/scores/sour minimum'],
    ['half a point', { scores: { ...NO_SCORES, sour: 5.5 }, words: '' }, '#/scores/sour type'],
    ['a score in words', { scores: { ...NO_SCORES, bitter: 'very' }, words: '' }, '#/scores/bitter type'],
    [
      'a scale that is none',
      { scores: { ...NO_SCORES, umami: 5 }, words: '' },
      '#/scores/umami additionalProperties',
    ],
    ['no scores', { words: 'x' }, '#/scores required'],
    ['2001 letters', { scores: NO_SCORES, words: 'x'.repeat(2001) }, '#/words maxLength'],
    ['an author of its own', { ...A_NOTE, author: randomUUID() }, '#/author additionalProperties'],
  ])('with %s is refused at the field', async (_what, body, expected) => {
    const answer = await add('bartender', body);
    expect(answer.status).toBe(422);
    expect(answer.fieldErrors).toContain(expected);
    expect(await list()).toEqual([]);
  });

  it('on a version that is not there or another team’s is not found', async () => {
    const theirs = await aSavedSour(await aWorkplace(app));
    for (const id of [randomUUID(), theirs.version.id, 'no-id']) {
      const path = `${place.at}/versions/${id}/notes`;
      expect((await place.team.as('bartender').post<Note>(path, A_NOTE)).status).toBe(404);
      expect((await place.team.as('bartender').get<NoteList>(path)).status).toBe(404);
    }
  });
});

describe('changing a note', () => {
  it('replaces it and raises its revision', async () => {
    const note = (await add('trainer')).body;
    const { body } = await change('trainer', note, {
      scores: { ...NO_SCORES, sour: 9 },
      words: 'Later: sharp.',
    });
    expect(body).toMatchObject({
      id: note.id,
      revision: 2,
      scores: { ...NO_SCORES, sour: 9 },
      words: 'Later: sharp.',
    });
    expect(body.createdAt).toBe(note.createdAt);
    expect(await list()).toEqual([body]);
  });

  it('by another person is refused, even a manager, and changes nothing', async () => {
    const note = (await add('trainer')).body;
    for (const role of ['bartender', 'manager'] as const) {
      expect((await change(role, note, { ...A_NOTE, words: 'Mine.' })).problem).toMatchObject({
        name: 'forbidden',
        status: 403,
      });
      expect((await remove(role, note)).problem.name).toBe('forbidden');
    }
    expect(await list()).toEqual([note]);
  });

  it('based on an earlier revision is refused with the note as it stands', async () => {
    const note = (await add('trainer')).body;
    const current = (await change('trainer', note, { ...A_NOTE, words: 'First.' })).body;
    for (const answer of [
      await change('trainer', note, { ...A_NOTE, words: 'Second.' }),
      await remove('trainer', note),
    ]) {
      expect(answer.problem).toMatchObject({
        name: 'stale-version',
        status: 412,
        currentRevision: 2,
        current,
      });
    }
    expect(await list()).toEqual([current]);
  });

  it('twice at once lets one through', async () => {
    const note = (await add('trainer')).body;
    const answers = await Promise.all(
      Array.from({ length: 12 }, (_, n) => change('trainer', note, { ...A_NOTE, words: `try ${n}` })),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([
      200,
      ...Array.from({ length: 11 }, () => 412),
    ]);
  });

  it('to nothing is refused at the words', async () => {
    const note = (await add('trainer')).body;
    expect((await change('trainer', note, { scores: NO_SCORES, words: '' })).fieldErrors).toEqual([
      '#/words empty',
    ]);
  });

  it('through another version is not found', async () => {
    const note = (await add('trainer')).body;
    const other = await aSavedSour(place);
    const path = `${place.at}/versions/${other.version.id}/notes/${note.id}`;
    expect((await place.team.as('trainer').put<Note>(path, A_NOTE, { ifMatch: 1 })).problem).toMatchObject({
      name: 'not-found',
      resource: 'note',
    });
  });
});

describe('removing a note', () => {
  it('takes it from the list, and the history says that there was one', async () => {
    const note = (await add('trainer')).body;
    expect((await remove('trainer', note)).status).toBe(204);
    expect(await list()).toEqual([]);
    expect((await historyOf(place, specId))[0]).toBe(
      'note.removed: Removed an own tasting note on House sour version 1',
    );
    expect((await remove('trainer', note)).problem.name).toBe('not-found');
  });
});
