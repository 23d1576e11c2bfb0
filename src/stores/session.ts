import { defineStore } from 'pinia';
import { computed, ref, shallowRef } from 'vue';

import type { Account, MembershipSummary, SignIn } from '#shared/contracts/account.ts';
import { acceptInvitation, getAccount, signIn, signOut } from '#src/api/account.ts';
import { ApiProblem } from '#src/api/http.ts';

export type SessionStatus = 'unknown' | 'signed-in' | 'signed-out' | 'failed';

/** Who is signed in, and in which teams with which roles. */
export const useSessionStore = defineStore('session', () => {
  const account = shallowRef<Account | null>(null);
  const status = ref<SessionStatus>('unknown');
  const failure = shallowRef<unknown>(null);
  let loading: Promise<void> | null = null;

  function take(signedIn: Account | null) {
    account.value = signedIn;
    failure.value = null;
    status.value = signedIn === null ? 'signed-out' : 'signed-in';
  }

  async function askServer() {
    try {
      take(await getAccount());
    } catch (error) {
      if (error instanceof ApiProblem && error.is('unauthenticated')) {
        take(null);
        return;
      }
      failure.value = error;
      if (status.value === 'unknown') status.value = 'failed';
    }
  }

  /** Asks the server who is signed in; several callers share one request. */
  function reload(): Promise<void> {
    if (status.value === 'failed') status.value = 'unknown';
    loading ??= askServer().finally(() => (loading = null));
    return loading;
  }

  /** Knows who is signed in, asking only the first time. */
  async function ensure(): Promise<void> {
    if (status.value === 'unknown' || status.value === 'failed') await reload();
  }

  async function enter(credentials: SignIn): Promise<void> {
    take(await signIn(credentials));
  }

  async function leave(): Promise<void> {
    await signOut();
    take(null);
  }

  async function join(invitationToken: string): Promise<void> {
    take(await acceptInvitation(invitationToken));
  }

  function membershipIn(teamId: string): MembershipSummary | null {
    return account.value?.teams.find((team) => team.teamId === teamId) ?? null;
  }

  return {
    account,
    status,
    failure,
    teams: computed(() => account.value?.teams ?? []),
    ensure,
    reload,
    enter,
    leave,
    join,
    membershipIn,
    /** The session ended on the server's side. */
    forget: () => take(null),
  };
});
