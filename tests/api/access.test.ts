import { randomUUID } from 'node:crypto';

import { afterAll, beforeAll, describe, expect, it } from 'vitest';

import { ROLES, type Role } from '#shared/contracts/roles.ts';

import type { AnyRoute } from '#server/http/route.ts';
import { apiRoutes } from '#server/routes.ts';

import { ACCESS_CASES, type AccessCase } from '#tests/support/access-cases.ts';
import { type TestApp, startTestApp } from '#tests/support/app.ts';
import type { Answer, ApiClient } from '#tests/support/client.ts';
import { type TeamWorld, aTeamWorld } from '#tests/support/team-world.ts';

const routes = apiRoutes();
const teamRoutes = routes.filter(({ access }) => access.kind === 'team');
const byName = (list: AnyRoute[]) => list.map((route) => [route.operationId, route] as const);

let app: TestApp;
/** A world for all that only reads or is refused, and one of another team with the same names in it. */
let ours: TeamWorld;
let theirs: TeamWorld;
beforeAll(async () => {
  app = await startTestApp();
  ours = await aTeamWorld(app);
  theirs = await aTeamWorld(app);
});
afterAll(() => app.stop());

function caseOf({ operationId }: AnyRoute): AccessCase {
  const found = ACCESS_CASES[operationId];
  if (found === undefined) throw new Error(`${operationId} has no entry in tests/support/access-cases.ts`);
  return found;
}

function paramsOf(path: string): string[] {
  return [...path.matchAll(/:(\w+)/g)].map(([, name]) => name ?? '');
}

function addressOf(path: string, ids: Record<string, string>): string {
  return path.replaceAll(/:(\w+)/g, (_match, name: string) => {
    const id = ids[name];
    if (id === undefined) throw new Error(`the parameter ${name} has no id in tests/support/team-world.ts`);
    return id;
  });
}

interface Call {
  client: ApiClient;
  world: TeamWorld;
  /** Ids to use in the address instead of the world's. */
  ids?: Record<string, string>;
  /** Whose things the body and the query name; the world's own unless said otherwise. */
  named?: TeamWorld;
}

async function call(
  route: AnyRoute,
  { client, world, ids = {}, named = world }: Call,
): Promise<Answer<unknown>> {
  const { body, query } = caseOf(route);
  const ifMatch = route.ifMatch === true ? await revisionFor(route, world) : undefined;
  return client.call(route.method, addressOf(route.path, { ...world.ids, ...ids }), {
    ...(body && { body: body(named) }),
    ...(query && { query: query(named) }),
    ...(ifMatch !== undefined && { ifMatch }),
  });
}

async function revisionFor(route: AnyRoute, { team, ids }: TeamWorld): Promise<number> {
  const { ifMatch } = caseOf(route);
  if (ifMatch === undefined) throw new Error(`${route.operationId} needs ifMatch in its access case`);
  if (typeof ifMatch === 'number') return ifMatch;
  const path = addressOf(ifMatch.path, ids);
  const { body } = await team.as('manager').get<Record<string, number>>(path);
  return body[ifMatch.member] ?? 0;
}

/** Whether a call changes something that other tests may look at; reading and adding do not. */
function changesThings({ method, path }: AnyRoute): boolean {
  return method !== 'get' && (paramsOf(path).length > 1 || method === 'put');
}

/** The ids of a member's own view: notes are changed by their author alone. */
function idsFor(world: TeamWorld, role: Role): Record<string, string> {
  return { noteId: world.noteIds[role] };
}

/** All that an answer says, with the ids it repeats from the request made alike. */
function shapeOf(answer: Answer<unknown>, ids: readonly string[]): unknown {
  const { instance: _instance, ...problem } = answer.problem;
  const text = ids.reduce((masked, id) => masked.replaceAll(id, '<id>'), JSON.stringify(problem));
  return { status: answer.status, headers: Object.keys(answer.headers).sort(), text };
}

describe('the list of routes', () => {
  it('has one access case for each, and none for a route that is gone', () => {
    expect(Object.keys(ACCESS_CASES).sort()).toEqual(routes.map(({ operationId }) => operationId).sort());
  });

  it('lets nobody into the addresses of a team but through its membership', () => {
    const inTeams = routes.filter(({ path }) => path.startsWith('/teams/'));
    expect(inTeams.map(({ access }) => access.kind)).toEqual(inTeams.map(() => 'team'));
    expect(teamRoutes.every(({ path }) => path.startsWith('/teams/:teamId'))).toBe(true);
  });

  it.each(byName(routes))('declares every parameter of %s, as an id or a token', (_name, route) => {
    const declared = Object.keys(route.params?.properties ?? {});
    expect(declared.sort()).toEqual(paramsOf(route.path).sort());
  });
});

describe('signed out', () => {
  it.each(byName(routes))('%s', async (_name, route) => {
    const answer = await call(route, { client: app.stranger(), world: ours });
    if (caseOf(route).who === 'anybody') {
      expect(answer.status).toBeLessThan(400);
    } else {
      expect(answer.problem).toMatchObject({ name: 'unauthenticated', status: 401 });
    }
  });
});

describe('signed in and in no team', () => {
  it.each(byName(routes.filter(({ access }) => access.kind !== 'team')))(
    '%s is answered',
    async (_name, route) => {
      const { client } = await app.addPerson();
      const world = await aTeamWorld(app);
      const answer = await call(route, { client, world });
      expect(answer.isProblem ? answer.problem : undefined).toBeUndefined();
    },
  );
});

describe('with each role', () => {
  it.each(byName(teamRoutes))('%s', async (_name, route) => {
    const { who, before } = caseOf(route);
    const allowed = ROLES.filter(
      (role) => who !== 'anybody' && who !== 'the signed-in' && who.includes(role),
    );
    const world = changesThings(route) ? await aTeamWorld(app) : ours;
    await before?.(world);
    const as = (role: Role) => call(route, { client: world.team.as(role), world, ids: idsFor(world, role) });

    for (const role of ROLES.filter((other) => !allowed.includes(other))) {
      const { problem } = await as(role);
      expect(problem, role).toMatchObject({ name: 'forbidden', status: 403 });
    }
    const [first, ...others] = allowed;
    expect(first, 'somebody may call it').toBeDefined();
    if (first === undefined) return;
    const answer = await as(first);
    expect(answer.isProblem ? answer.problem : undefined, first).toBeUndefined();
    // The first has changed the state: what matters for the others is that it is not their role that stops them.
    for (const role of others) expect([401, 403], role).not.toContain((await as(role)).status);
  });

  it('held together, all that one of them may', async () => {
    const { client } = await app.addMember({
      teamId: ours.team.id,
      roles: ['bartender', 'menu-writer', 'trainer'],
    });
    const lock = routes.find(({ operationId }) => operationId === 'lockVersion');
    const edit = routes.find(({ operationId }) => operationId === 'createSpec');
    if (lock === undefined || edit === undefined) throw new Error('these routes are gone');
    expect((await call(lock, { client, world: ours })).status).not.toBe(403);
    expect((await call(edit, { client, world: ours })).status).toBe(403);
  });
});

describe("another team's address", () => {
  it.each(byName(teamRoutes))('%s is answered like one that does not exist', async (_name, route) => {
    const missing = randomUUID();
    const client = theirs.team.as('manager');
    const unknown = await call(route, { client, world: ours, ids: { teamId: missing } });
    for (const role of ROLES) {
      const foreign = await call(route, { client: theirs.team.as(role), world: ours });
      expect(foreign.status, role).toBe(404);
      expect(shapeOf(foreign, [ours.team.id]), role).toEqual(shapeOf(unknown, [missing]));
    }
  });

  it.each([['not-a-uuid'], ['00000000-0000-0000-0000-000000000000'], ["' or 1=1 --"], ['%'], ['*']])(
    'such as %s is answered in the same way',
    async (teamId) => {
      const client = theirs.team.as('manager');
      const odd = await client.get(`/teams/${encodeURIComponent(teamId)}`);
      const foreign = await client.get(`/teams/${ours.team.id}`);
      expect(shapeOf(odd, [teamId])).toEqual(shapeOf(foreign, [ours.team.id]));
    },
  );
});

describe("another team's things in one's own team", () => {
  const withIds = teamRoutes.filter(({ path }) => paramsOf(path).length > 1);

  it.each(byName(withIds))('%s is answered like an id that does not exist', async (_name, route) => {
    const client = ours.team.as('manager');
    for (const name of paramsOf(route.path).filter((param) => param !== 'teamId')) {
      const missing = randomUUID();
      const theirId = theirs.ids[name] ?? '';
      const foreign = await call(route, { client, world: ours, ids: { [name]: theirId } });
      const unknown = await call(route, { client, world: ours, ids: { [name]: missing } });
      expect(foreign.problem, name).toMatchObject({ name: 'not-found', status: 404 });
      expect(shapeOf(foreign, [theirId]), name).toEqual(shapeOf(unknown, [missing]));
      const odd = await call(route, { client, world: ours, ids: { [name]: 'no-id' } });
      expect(shapeOf(odd, ['no-id']), name).toEqual(shapeOf(unknown, [missing]));
    }
  });

  const naming = ['branchSpec', 'putDraft', 'startDraftFromVersion', 'listVersions'];

  it.each(byName(teamRoutes.filter(({ operationId }) => naming.includes(operationId))))(
    'named in the body or query of %s are answered like ones that do not exist',
    async (_name, route) => {
      const client = ours.team.as('manager');
      const lost: Record<string, string> = {};
      const nowhere = JSON.parse(
        JSON.stringify({ ids: theirs.ids, draft: theirs.draft }, (_key, value: unknown) =>
          typeof value === 'string' && Object.values(theirs.ids).includes(value)
            ? (lost[value] ??= randomUUID())
            : value,
        ),
      ) as Pick<TeamWorld, 'ids' | 'draft'>;
      const foreign = await call(route, { client, world: ours, named: theirs });
      const unknown = await call(route, { client, world: ours, named: { ...theirs, ...nowhere } });
      expect(foreign.isProblem).toBe(true);
      expect(shapeOf(foreign, Object.keys(lost))).toEqual(shapeOf(unknown, Object.values(lost)));
    },
  );

  it('are in no list, count or history of ours', async () => {
    const lists = teamRoutes.filter(
      ({ method, path }) => method === 'get' && paramsOf(path).join() === 'teamId' && !path.endsWith('.csv'),
    );
    expect(lists.length).toBeGreaterThan(5);
    for (const route of lists) {
      const { text } = await call(route, { client: ours.team.as('manager'), world: ours });
      for (const id of [...Object.values(theirs.ids), theirs.team.members.developer.id]) {
        expect(text, route.operationId).not.toContain(id);
      }
    }
  });

  it('do not stand in the way of the same names in ours', () => {
    expect(ours.draft.lines).toHaveLength(theirs.draft.lines.length);
    expect(ours.ids['specId']).not.toBe(theirs.ids['specId']);
  });

  it('were changed by none of all this', async () => {
    const fresh = await aTeamWorld(app);
    for (const path of ['/specs/:specId', '/versions/:versionId', '/ingredients/:ingredientId', '']) {
      const [after, untouched] = await Promise.all(
        [theirs, fresh].map(async ({ ids, team }) => {
          const { body } = await team
            .as('manager')
            .get<{ revision: number }>(addressOf(`/teams/:teamId${path}`, ids));
          return body.revision;
        }),
      );
      expect(after, path).toBe(untouched);
    }
  });
});
