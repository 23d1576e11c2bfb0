import { flushPromises } from '@vue/test-utils';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';

import type { Account } from '#shared/contracts/account.ts';
import type { Role } from '#shared/contracts/roles.ts';
import type { SpecSummary } from '#shared/contracts/spec.ts';
import SpecListPage from '#src/pages/specs/SpecListPage.vue';
import { usePreferencesStore } from '#src/stores/preferences.ts';
import { useSessionStore } from '#src/stores/session.ts';
import { useTeamStore } from '#src/stores/team.ts';
import { allByRole, byRole, fieldNamed, textOf, typeInto } from '#tests/support/by-role.ts';
import { anId } from '#tests/support/builders.ts';
import { type FakeAnswer, type SentRequest, aProblem, fakeApi } from '#tests/support/fake-api.ts';
import { mountPage } from '#tests/support/mount-app.ts';

const TEAM = anId(7);

function aSummary(over: Partial<SpecSummary> = {}): SpecSummary {
  return {
    id: anId(20),
    revision: 3,
    familyId: anId(21),
    name: 'Harbour Sour',
    variantName: null,
    latestVersion: { id: anId(22), number: 4, state: 'on trial' },
    lockedVersion: null,
    headline: { finalMl: 118.294118, abvFraction: 0.1834, sugarGPerL: 71.26, acidCitricGPerL: 8.44 },
    updatedAt: '2026-11-20T12:00:00.000Z',
    updatedBy: { id: anId(1), name: 'Developer' },
    retiredAt: null,
    ...over,
  };
}

function account(roles: Role[]): Account {
  return {
    id: anId(1),
    email: 'developer@example.test',
    name: 'Developer',
    teams: [{ teamId: TEAM, teamName: 'The Gannet Room', roles }],
  };
}

const page = (items: SpecSummary[], nextCursor: string | null = null): FakeAnswer => ({
  status: 200,
  body: { items, nextCursor },
});

let unmount = () => {};
beforeEach(() => localStorage.clear());
afterEach(() => {
  unmount();
  vi.unstubAllGlobals();
});

async function openList(
  answer: (sent: SentRequest) => FakeAnswer,
  options: { path?: string; roles?: Role[] } = {},
) {
  const sent = fakeApi((request) => {
    if (request.path === '/auth/me') return { status: 200, body: account(options.roles ?? ['developer']) };
    if (request.path === `/teams/${TEAM}`) return aProblem('unavailable', 503);
    return answer(request);
  });
  const mounted = await mountPage({
    page: SpecListPage,
    props: { teamId: TEAM },
    path: options.path ?? '/page',
    prepare: async () => {
      await useSessionStore().ensure();
      await useTeamStore().open(TEAM);
    },
  });
  unmount = mounted.unmount;
  return { router: mounted.router, sent: () => sent.filter(({ path }) => path.includes('/specs')) };
}

describe('the list of specs', () => {
  it('shows the headline figures of the newest version, in the chosen unit', async () => {
    await openList(() => page([aSummary()]));
    const row = byRole(document.body, 'row', /Harbour Sour/);
    expect(textOf(row)).toMatch(/on trial/);
    expect(textOf(row)).toMatch(/118\sml/);
    expect(textOf(row)).toMatch(/18\.3\s%/);
    expect(textOf(row)).toMatch(/71\.3\sg\/L/);
    expect(textOf(row)).toMatch(/8\.4\sg\/L/);

    // 118.294118 mL are 4.000 US fluid ounces of 29.5735295625 mL (NIST Handbook 44, appendix C).
    usePreferencesStore().setVolumeUnit('oz');
    await flushPromises();
    expect(textOf(row)).toMatch(/\b4(\.0+)?\soz/);
  });

  it('shows a spec without a version without inventing figures', async () => {
    await openList(() => page([aSummary({ latestVersion: null, headline: null })]));
    const words = textOf(byRole(document.body, 'row', /Harbour Sour/));
    expect(words).toContain('none saved yet');
    expect(words).not.toMatch(/\d\s?(ml|%|g\/L)/);
  });

  it('that failed is not an empty list, and can be tried again', async () => {
    let isDown = true;
    await openList(() => (isDown ? aProblem('internal', 500) : page([aSummary()])));
    expect(textOf(byRole(document.body, 'alert'))).toContain('title of internal');
    expect(textOf(document.body)).not.toMatch(/No specs yet|No spec fits/);
    isDown = false;
    byRole(document.body, 'button', 'Try again').click();
    await flushPromises();
    byRole(document.body, 'link', 'Harbour Sour');
  });

  it('with nothing in it invites a developer to begin, and tells a bartender who does', async () => {
    await openList(() => page([]));
    byRole(document.body, 'heading', 'No specs yet');
    expect(allByRole(document.body, 'button', 'New spec')).toHaveLength(2);
    unmount();

    await openList(() => page([]), { roles: ['bartender'] });
    byRole(document.body, 'heading', 'No specs yet');
    expect(allByRole(document.body, 'button', 'New spec')).toHaveLength(0);
  });

  it('filtered to nothing is told from an empty one, and the filter can be cleared', async () => {
    const { router } = await openList(({ path }) => page(path.includes('search=') ? [] : [aSummary()]), {
      path: '/page?search=nothing&sort=name',
    });
    byRole(document.body, 'heading', 'No spec fits');
    byRole(document.body, 'button', 'Clear the filter').click();
    await flushPromises();
    byRole(document.body, 'link', 'Harbour Sour');
    expect(router.currentRoute.value.query).toEqual({ sort: 'name' });
  });

  it('loads the next page by its cursor and adds it', async () => {
    const second = aSummary({ id: anId(30), name: 'Low Tide' });
    const { sent } = await openList(({ path }) =>
      path.includes('cursor=c2') ? page([second]) : page([aSummary()], 'c2'),
    );
    byRole(document.body, 'button', 'Load more').click();
    await flushPromises();
    expect(sent()).toHaveLength(2);
    expect(allByRole(document.body, 'link').map(textOf)).toEqual(['Harbour Sour', 'Low Tide']);
    expect(allByRole(document.body, 'button', 'Load more')).toHaveLength(0);
  });

  it('keeps the rows it has when the next page fails', async () => {
    await openList(({ path }) => (path.includes('cursor=') ? 'no network' : page([aSummary()], 'c2')));
    byRole(document.body, 'button', 'Load more').click();
    await flushPromises();
    byRole(document.body, 'link', 'Harbour Sour');
    byRole(document.body, 'alert');
  });

  it('searches once after a pause in typing', async () => {
    vi.useFakeTimers({ shouldAdvanceTime: false });
    try {
      const { sent } = await openList(() => page([aSummary()]));
      for (const typed of ['h', 'hu', 'hus', 'husk']) {
        typeInto(fieldNamed(document.body, 'Search by name'), typed);
        await vi.advanceTimersByTimeAsync(100);
      }
      expect(sent()).toHaveLength(1);
      await vi.advanceTimersByTimeAsync(300);
      await flushPromises();
      expect(sent()).toHaveLength(2);
      expect(sent()[1]?.path).toContain('search=husk');
    } finally {
      vi.useRealTimers();
    }
  });
});

describe('a new spec', () => {
  it('needs a name, then goes to the bench', async () => {
    const { sent, router } = await openList(({ method }) =>
      method === 'POST' ? { status: 201, body: aSummary({ id: anId(40) }) } : page([aSummary()]),
    );
    byRole(document.body, 'button', 'New spec').click();
    await flushPromises();
    byRole(document.body, 'button', 'To the bench').click();
    await flushPromises();
    expect(fieldNamed(document.body, 'Name of the drink').getAttribute('aria-invalid')).toBe('true');

    typeInto(fieldNamed(document.body, 'Name of the drink'), ' Low Tide ');
    byRole(document.body, 'button', 'To the bench').click();
    await flushPromises();
    expect(sent().at(-1)).toMatchObject({ method: 'POST', body: { name: 'Low Tide', description: '' } });
    expect(router.currentRoute.value).toMatchObject({ name: 'spec', params: { teamId: TEAM } });
  });
});
