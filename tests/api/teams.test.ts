import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import type { Team } from '#shared/contracts/team.ts';

import { type TestApp, type TestTeam, startTestApp } from '#tests/support/app.ts';

let app: TestApp;
let team: TestTeam;
beforeAll(async () => {
  app = await startTestApp();
  team = await app.addTeam();
});
afterAll(() => app.stop());

describe('the settings of a team', () => {
  it('are changed by a manager, with a new revision', async () => {
    const manager = team.as('manager');
    const before = (await manager.get<Team>(`/teams/${team.id}`)).body;
    const change = {
      name: 'The Gannet Rooms',
      country: 'IE',
      currency: 'EUR',
      houseMeasures: { dashMl: 0.9, barSpoonMl: 4, dropMl: 0.05 },
    };
    const answer = await manager.put<Team>(`/teams/${team.id}`, change, { ifMatch: before.revision });
    expect(answer.body).toMatchObject({ ...change, revision: before.revision + 1 });
    expect(answer.headers['etag']).toBe(`"${before.revision + 1}"`);
    const stale = await manager.put<Team>(`/teams/${team.id}`, change, { ifMatch: before.revision });
    expect(stale.problem).toMatchObject({ name: 'stale-version', current: answer.body });
  });
});
