import { flushPromises } from '@vue/test-utils';
import { afterEach, describe, expect, it, vi } from 'vitest';

import type { Role } from '#shared/contracts/roles.ts';
import HistoryPage from '#src/pages/team/HistoryPage.vue';
import { useSessionStore } from '#src/stores/session.ts';
import { useTeamStore } from '#src/stores/team.ts';
import { byRole, fieldNamed, textOf, typeInto } from '#tests/support/by-role.ts';
import { anId } from '#tests/support/builders.ts';
import { aProblem, fakeApi } from '#tests/support/fake-api.ts';
import { mountPage } from '#tests/support/mount-app.ts';

const TEAM = anId(7);
const EVENT = {
  id: anId(60),
  at: '2026-11-20T12:00:00.000Z',
  actor: null,
  action: 'spec.locked',
  subjectType: 'spec',
  subjectId: anId(61),
  summary: 'Locked version 2 of Harbour Sour',
};

let unmount = () => {};
afterEach(() => {
  unmount();
  vi.unstubAllGlobals();
});

async function openHistory(roles: Role[]) {
  const account = {
    id: anId(1),
    email: 'manager@example.test',
    name: 'Bar manager',
    teams: [{ teamId: TEAM, teamName: 'The Gannet Room', roles }],
  };
  const sent = fakeApi(({ path }) => {
    if (path === '/auth/me') return { status: 200, body: account };
    if (path.includes('/history')) {
      return { status: 200, body: { items: path.includes('from=') ? [] : [EVENT], nextCursor: null } };
    }
    return aProblem('unavailable', 503);
  });
  const mounted = await mountPage({
    page: HistoryPage,
    props: { teamId: TEAM },
    prepare: async () => {
      await useSessionStore().ensure();
      await useTeamStore().open(TEAM);
    },
  });
  unmount = mounted.unmount;
  return () => sent.filter(({ path }) => path.includes('/history'));
}

describe('the history', () => {
  it('says what happened, and by whom even if they have left', async () => {
    await openHistory(['manager']);
    expect(textOf(byRole(document.body, 'row', /Locked version 2/))).toContain('somebody who has left');
  });

  it('is asked for by days, and days without events are told from no history', async () => {
    const sent = await openHistory(['manager']);
    typeInto(fieldNamed(document.body, 'From'), '2026-11-25');
    await flushPromises();
    expect(sent().at(-1)?.path).toContain('from=2026-11-25');
    byRole(document.body, 'heading', 'Nothing happened on these days');
  });

  it('is not even asked for by somebody who may not read it', async () => {
    const sent = await openHistory(['developer', 'trainer']);
    byRole(document.body, 'heading', 'Your roles do not open this page');
    expect(sent()).toHaveLength(0);
  });
});
