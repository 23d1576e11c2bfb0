import { defineStore } from 'pinia';
import { computed, ref, shallowRef } from 'vue';

import { type Permission, hasPermission } from '#shared/contracts/roles.ts';
import type { Team } from '#shared/contracts/team.ts';
import { DEFAULT_HOUSE_MEASURES, type HouseMeasures } from '#shared/units/house-measures.ts';
import { getTeam } from '#src/api/teams.ts';
import { useSessionStore } from './session.ts';

/** The team whose pages are open: its settings, and what the signed-in person may do in it. */
export const useTeamStore = defineStore('team', () => {
  const session = useSessionStore();
  const teamId = ref<string | null>(null);
  const team = shallowRef<Team | null>(null);
  const status = ref<'loading' | 'ready' | 'failed'>('loading');
  const failure = shallowRef<unknown>(null);

  const membership = computed(() => (teamId.value === null ? null : session.membershipIn(teamId.value)));
  const roles = computed(() => membership.value?.roles ?? []);
  const houseMeasures = computed<HouseMeasures>(() => team.value?.houseMeasures ?? DEFAULT_HOUSE_MEASURES);

  /** Makes a team the open one and loads its settings; a late answer about another team is dropped. */
  async function open(id: string): Promise<void> {
    if (teamId.value !== id) team.value = null;
    teamId.value = id;
    status.value = 'loading';
    try {
      const answer = await getTeam(id);
      if (teamId.value !== id) return;
      take(answer);
    } catch (error) {
      if (teamId.value !== id) return;
      failure.value = error;
      status.value = 'failed';
    }
  }

  /** Takes over settings that were just saved. */
  function take(saved: Team) {
    team.value = saved;
    failure.value = null;
    status.value = 'ready';
  }

  return {
    teamId,
    team,
    status,
    failure,
    membership,
    roles,
    houseMeasures,
    open,
    take,
    /** What to offer. The server decides again. */
    can: (permission: Permission) => hasPermission(roles.value, permission),
  };
});
