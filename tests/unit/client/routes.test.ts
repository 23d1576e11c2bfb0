import { createPinia, setActivePinia } from 'pinia';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { type Router, createMemoryHistory, createRouter } from 'vue-router';

import { routes } from '#src/router/routes.ts';
import { useSessionStore } from '#src/stores/session.ts';
import { anId } from '#tests/support/builders.ts';
import { fakeApi } from '#tests/support/fake-api.ts';

const TEAM = anId(7);

function appRoutes(): Router {
  return createRouter({ history: createMemoryHistory(), routes });
}

describe('the addresses', () => {
  it.each([
    ['/', 'home'],
    ['/teams', 'teams'],
    ['/account', 'account'],
    ['/sign-in', 'sign-in'],
    ['/sign-up', 'sign-up'],
    ['/invitation/abcdefghijklmnopqrstuvwx', 'invitation'],
    [`/t/${TEAM}/specs`, 'specs'],
    [`/t/${TEAM}/specs/${anId(1)}`, 'spec'],
    [`/t/${TEAM}/specs/${anId(1)}/versions`, 'spec-versions'],
    [`/t/${TEAM}/versions/${anId(2)}`, 'version'],
    [`/t/${TEAM}/compare?v=a,b`, 'compare'],
    [`/t/${TEAM}/ingredients`, 'ingredients'],
    [`/t/${TEAM}/ingredients/new`, 'ingredient-new'],
    [`/t/${TEAM}/ingredients/import`, 'ingredient-import'],
    [`/t/${TEAM}/ingredients/${anId(3)}`, 'ingredient'],
    [`/t/${TEAM}/glasses`, 'glasses'],
    [`/t/${TEAM}/team`, 'team'],
    [`/t/${TEAM}/history`, 'history'],
    ['/nowhere', 'not-found'],
    [`/t/${TEAM}/nowhere`, 'not-found'],
  ])('%s is the page %s', (path, name) => {
    expect(appRoutes().resolve(path).name).toBe(name);
  });

  it('may be opened by strangers only where signing in has not happened yet', () => {
    const isPublic = (path: string) =>
      appRoutes()
        .resolve(path)
        .matched.some(({ meta }) => meta.access === 'public');
    expect(['/sign-in', '/sign-up', '/invitation/x', '/nowhere'].map(isPublic)).toEqual([
      true,
      true,
      true,
      true,
    ]);
    expect(['/', '/teams', '/account', `/t/${TEAM}/specs`].map(isPublic)).toEqual([
      false,
      false,
      false,
      false,
    ]);
  });
});

describe('the start page', () => {
  beforeEach(() => {
    setActivePinia(createPinia());
  });
  afterEach(() => vi.unstubAllGlobals());

  async function startWithTeams(teamIds: string[]): Promise<string> {
    const teams = teamIds.map((teamId) => ({ teamId, teamName: 'A team', roles: ['bartender'] }));
    fakeApi(() => ({ status: 200, body: { id: anId(1), email: 'a@example.test', name: 'A', teams } }));
    await useSessionStore().ensure();
    const bare = createRouter({ history: createMemoryHistory(), routes: withoutPages(routes) });
    await bare.push('/');
    return bare.currentRoute.value.fullPath;
  }

  it('is the only team there is', async () => {
    expect(await startWithTeams([TEAM])).toBe(`/t/${TEAM}/specs`);
  });

  it('is a choice when there are several teams and none was open before, or none at all', async () => {
    expect(await startWithTeams([TEAM, anId(8)])).toBe('/');
    setActivePinia(createPinia());
    expect(await startWithTeams([])).toBe('/');
  });
});

/** The same routes with nothing to load. */
function withoutPages(records: typeof routes): typeof routes {
  return records.map((record) => ({
    ...record,
    component: { render: () => null },
    ...(record.children && { children: withoutPages(record.children) }),
  })) as typeof routes;
}
