import { type Ref, ref, shallowRef } from 'vue';

import type { Version, VersionStateChange } from '#shared/contracts/version.ts';
import { changeVersionState, lockVersion, retireVersion, unlockVersion } from '#src/api/versions.ts';

export interface VersionActions {
  isBusy: Ref<boolean>;
  failure: Ref<unknown>;
  clearFailure: () => void;
  changeState: (state: VersionStateChange['state']) => Promise<boolean>;
  /** The reason may stay empty. */
  retire: (reason: string) => Promise<boolean>;
  lock: () => Promise<boolean>;
  unlock: (reason: string) => Promise<boolean>;
}

/** Moves a version between its states. Each action is based on the version as it is shown. */
export function useVersionActions(
  teamId: string,
  version: Ref<Version | null>,
  onChanged: (version: Version) => void,
): VersionActions {
  const isBusy = ref(false);
  const failure = shallowRef<unknown>(null);

  async function act(task: (based: Version) => Promise<Version>): Promise<boolean> {
    if (version.value === null || isBusy.value) return false;
    isBusy.value = true;
    failure.value = null;
    try {
      onChanged(await task(version.value));
      return true;
    } catch (error) {
      failure.value = error;
      return false;
    } finally {
      isBusy.value = false;
    }
  }

  return {
    isBusy,
    failure,
    clearFailure: () => (failure.value = null),
    changeState: (state) => act((based) => changeVersionState(teamId, based, { state })),
    retire: (reason) => act((based) => retireVersion(teamId, based, reason === '' ? {} : { reason })),
    lock: () => act((based) => lockVersion(teamId, based)),
    unlock: (reason) => act((based) => unlockVersion(teamId, based, reason)),
  };
}
